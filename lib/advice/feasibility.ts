import type { Estimate } from "@/lib/estimates/estimate";
import type { Capability } from "@/lib/questionnaire/answer-sets";
import { capabilityLabels, discretisationLabels } from "@/lib/questionnaire/answer-labels";
import type { Answers } from "@/lib/questionnaire/answers";
import { formatGib, formatPercent, formatSeconds } from "@/lib/shared/format";
import type { StrategyDefinition } from "@/lib/strategies/strategy";
import type { RankingEntry } from "./advice";
import { machineMemoryGiB } from "./facts";

/** What ranking needs of a strategy's definition. */
export type StrategyTraits = Pick<StrategyDefinition, "id" | "name" | "needs" | "discretisations" | "notForReason" | "fallback">;

export type Standing = { status: RankingEntry["status"]; reason: string | null };

/** From this share of the machine's memory on, the high end of a prediction is called near the limit. */
export const nearMemoryShare = 0.8;

/**
 * Whether a strategy may compete. What the discretisation and the program rule out comes first, then the rules' exclusions, then memory:
 * infeasible is a median prediction above the memory of all nodes used (and the reason says whether even the low end is).
 */
export function standingOf(answers: Answers, traits: StrategyTraits, estimate: Estimate, exclusions: readonly string[]): Standing {
  const missing = unavailableReason(answers, traits);
  if (missing !== null) return { status: "unavailable", reason: [missing, ...exclusions].join(" ") };
  if (exclusions.length > 0) return { status: "excluded", reason: exclusions.join(" ") };
  const memory = memoryReason(answers, estimate);
  return memory === null ? { status: "ranked", reason: null } : { status: "infeasible", reason: memory };
}

function unavailableReason(answers: Answers, traits: StrategyTraits): string | null {
  if (!traits.discretisations.includes(answers.discretisation)) {
    const why = traits.notForReason === "" ? "" : ` ${traits.notForReason}`;
    return `Not for ${lowerFirst(discretisationLabels[answers.discretisation])}.${why}`;
  }
  const missing = traits.needs.filter((need) => !answers.available.includes(need));
  return missing.length === 0 ? null : `The program does not supply what it needs: ${missing.map(capabilityWords).join(", ")}.`;
}

const capabilityWords = (capability: Capability): string => lowerFirst(capabilityLabels[capability].label);

/** Names of people, such as Raviart-Thomas, keep their capital. */
function lowerFirst(text: string): string {
  return /^(Raviart|Brezzi)/.test(text) ? text : text.charAt(0).toLowerCase() + text.slice(1);
}

function memoryReason(answers: Answers, { memoryGiB }: Estimate): string | null {
  const has = machineMemoryGiB(answers);
  if (memoryGiB.median <= has) return null;
  const [end, value] = memoryGiB.low > has ? ["even the low end", memoryGiB.low] : ["the median", memoryGiB.median];
  return `Does not fit in memory: ${end} of the prediction, ${formatGib(value)}, exceeds the machine's ${formatGib(has)} by ${formatGib(value - has)}.`;
}

/** Cautions about memory and time of a strategy that may compete. */
export function limitCautions(answers: Answers, estimate: Estimate): string[] {
  return [memoryCaution(answers, estimate), timeCaution(answers, estimate)].filter((text) => text !== null);
}

function memoryCaution(answers: Answers, { memoryGiB }: Estimate): string | null {
  const has = machineMemoryGiB(answers);
  if (memoryGiB.high <= nearMemoryShare * has) return null;
  const ahead = `Memory is near the limit: the prediction reaches ${formatGib(memoryGiB.high)}`;
  if (memoryGiB.high > has) {
    return `${ahead}, ${formatGib(memoryGiB.high - has)} more than the machine's ${formatGib(has)}. Running out can take a shared node down.`;
  }
  const share = formatPercent(memoryGiB.high / has);
  return `${ahead}, ${share} of the machine's ${formatGib(has)}; ${formatGib(has - memoryGiB.high)} are left. Running out can take a shared node down.`;
}

function timeCaution({ hardware }: Answers, { totalSeconds }: Estimate): string | null {
  const limit = hardware.timeLimitSeconds;
  if (limit === null || totalSeconds.high <= limit) return null;
  if (totalSeconds.median > limit) {
    return `Predicted time ${formatSeconds(totalSeconds.median)} exceeds the time limit of ${formatSeconds(limit)}.`;
  }
  return `May exceed the time limit of ${formatSeconds(limit)}: the prediction reaches ${formatSeconds(totalSeconds.high)}.`;
}
