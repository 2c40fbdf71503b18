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
export type StrategyId = (typeof strategyIds)[number];

/** Whether a recorded strategy is one of ours. */
export function isStrategyId(text: string): text is StrategyId {
  return strategyIds.some((id) => id === text);
}
