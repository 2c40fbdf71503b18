import type { CaseDetail } from "@/lib/api/contract/cases";

/**
 * Total time of the first compared run of each strategy over the predicted time of the advice's first, for the axis of relative
 * times. Only converged runs on the case's cores have a place on it.
 */
export function measuredRatios(detail: CaseDetail): Record<string, number> {
  const first = detail.advice.ranking.find((entry) => entry.status === "ranked");
  if (!first) return {};
  const score = first.factors.reduce((all, factor) => all * factor.factor, first.estimate.totalSeconds.median);
  const ratios: Record<string, number> = {};
  for (const run of detail.runList) {
    const total = run.comparison.totalSeconds;
    if (run.withdrawn || !run.comparison.converged || run.cores !== detail.limits.cores || total === null || run.strategy === "other") continue;
    ratios[run.strategy] ??= total / score;
  }
  return ratios;
}
