import { mcnemarTest } from "@/lib/numerics/statistics/mcnemar";
import { formatNumber, formatPercent } from "@/lib/shared/format";
import type { PairedTest } from "./replay-result";

/** Below this the difference is called more than chance. */
const smallProbability = 0.05;

const goals = { worked: "works", best: "is best" } as const;

/** McNemar's exact test of yes/no pairs [before, after] on the same cases, with its meaning in words. */
export function pairedTest(goal: keyof typeof goals, pairs: readonly (readonly [before: boolean, after: boolean])[]): PairedTest {
  const onlyBefore = pairs.filter(([before, after]) => before && !after).length;
  const onlyAfter = pairs.filter(([before, after]) => after && !before).length;
  const { pValue } = mcnemarTest(onlyBefore, onlyAfter);
  return { n: pairs.length, onlyBefore, onlyAfter, pValue, text: meaning(goals[goal], pairs.length, onlyBefore, onlyAfter, pValue) };
}

function meaning(goal: string, n: number, onlyBefore: number, onlyAfter: number, pValue: number): string {
  if (n === 0) return "No case has a run by both first choices, so the record can't tell the two apart.";
  const cases = n === 1 ? "the one case" : `the ${n} cases`;
  if (onlyBefore + onlyAfter === 0) return `On ${cases} where both can be judged, the two first choices came out alike.`;
  const counts = `Of ${cases} where both can be judged, only the draft's first choice ${goal} on ${onlyAfter}, only the live edition's on ${onlyBefore}.`;
  if (onlyBefore === onlyAfter) return `${counts} That is an even split: no sign of a difference.`;
  const odds = `Were the two equally good, a split at least as uneven would come up ${chance(pValue)}`;
  if (pValue >= smallProbability) return `${counts} ${odds}: this can well be chance.`;
  return `${counts} ${odds}: the ${onlyAfter > onlyBefore ? "draft" : "live edition"} is better, and chance is a poor explanation.`;
}

function chance(pValue: number): string {
  return pValue < 0.001 ? "less than once in 1000 times" : `in ${pValue < 0.1 ? formatNumber(100 * pValue, 2) + " %" : formatPercent(pValue)} of such records`;
}
