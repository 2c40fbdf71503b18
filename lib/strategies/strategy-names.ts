import type { StrategyId } from "@/lib/shared/strategy-ids";

/** Trade names, light enough for the browser; the definitions beside them say what each strategy is. */
export const strategyNames: Record<StrategyId, string> = {
  "direct-ldlt": "Sparse direct LDLᵀ",
  "direct-blr": "Sparse direct, block low-rank",
  "schur-diag-direct": "Diagonal Schur, factorised",
  "schur-diag-amg": "Diagonal Schur, multigrid",
  "schur-triangular": "Block triangular Schur, FGMRES",
  "regularized-amg": "Regularised block, multigrid",
  "hdiv-auxiliary": "H(div) auxiliary space",
  "hybridized-amg": "Hybridised, CG with multigrid",
  bddc: "BDDC / FETI-DP",
  "schwarz-two-level": "Two-level Schwarz",
  "p-multigrid": "p-multigrid, augmented block",
};

/** Name of a recorded strategy; `other` ones carry their own. */
export function strategyName(strategy: string, otherName?: string | null): string {
  const known: Record<string, string> = strategyNames;
  return known[strategy] ?? otherName ?? "Other";
}
