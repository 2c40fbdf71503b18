import type { Answers } from "@/lib/questionnaire/answers";
import type { CaseLimits } from "./comparison";

/** What a case asks of its runs; memory is that of all its nodes together. */
export function caseLimits({ tolerance, repeatedSolves, hardware }: Pick<Answers, "tolerance" | "repeatedSolves" | "hardware">): CaseLimits {
  const { timeLimitSeconds, nodes, memoryPerNodeGiB, cores } = hardware;
  return { tolerance, repeatedSolves, timeLimitSeconds, memoryGiB: nodes * memoryPerNodeGiB, cores };
}
