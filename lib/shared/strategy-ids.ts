import { z } from "zod";

/** The eleven strategies, in the order in which they are listed when nothing else decides. */
export const strategyIds = [
  "direct-ldlt",
  "direct-blr",
  "schur-diag-direct",
  "schur-diag-amg",
  "schur-triangular",
  "regularized-amg",
  "hdiv-auxiliary",
  "hybridized-amg",
  "bddc",
  "schwarz-two-level",
  "p-multigrid",
] as const;

export const strategyIdSchema = z.enum(strategyIds);
export type StrategyId = z.infer<typeof strategyIdSchema>;
