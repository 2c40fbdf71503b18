import type { Estimate } from "@/lib/estimates/estimate";
import type { Priority } from "@/lib/questionnaire/answer-sets";
import { formatGib, formatRatio } from "@/lib/shared/format";
import type { Factor } from "./advice";

type Weighted = Pick<Estimate, "memoryGiB" | "totalSeconds">;

/**
 * What a priority does to the score, in one place. `time`: nothing. `memory`: the score is multiplied by the square root of the predicted
 * memory over the leanest candidate's, so that four times the memory must buy half the time. `robustness`: the score is multiplied by
 * the high end of the predicted total time over its median, so that candidates are compared on their bad days.
 * `leanestGiB` is the smallest median memory of the candidates. Null where the score stays as it is.
 */
export function priorityFactor(priority: Priority, estimate: Weighted, leanestGiB: number): Factor | null {
  const weight = priorityWeight(priority, estimate, leanestGiB);
  switch (priority) {
    case "time":
      return null;
    case "memory":
      return factor(weight, `Priority memory: square root of ${formatGib(estimate.memoryGiB.median)} over the leanest candidate's ${formatGib(leanestGiB)}.`);
    case "robustness":
      return factor(weight, `Priority robustness: the high end of the time range, ${formatRatio(weight)} the median, counts.`);
  }
}

/** The number alone, 1 where the score stays as it is; for replays, which look at many cases. */
export function priorityWeight(priority: Priority, { memoryGiB, totalSeconds }: Weighted, leanestGiB: number): number {
  switch (priority) {
    case "time":
      return 1;
    case "memory":
      return leanestGiB > 0 ? Math.sqrt(Math.max(1, memoryGiB.median / leanestGiB)) : 1;
    case "robustness":
      return totalSeconds.median > 0 ? Math.max(1, totalSeconds.high / totalSeconds.median) : 1;
  }
}

function factor(value: number, text: string): Factor {
  return { kind: "priority", rule: null, factor: value, text, source: null };
}
