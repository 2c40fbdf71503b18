import type { StrategyTraits } from "@/lib/advice/feasibility";
import { byStrategy } from "@/lib/advice/evidence";
import type { Estimates } from "@/lib/advice/facts";
import type { Estimate } from "@/lib/estimates/estimate";
import { discretisations } from "@/lib/questionnaire/answer-sets";
import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema, type QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";
import { spreadRange } from "@/lib/shared/range";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";

/** The default answers with some changed. */
export function answersWith(changes: Partial<QuestionnaireInput> = {}): Answers {
  return toAnswers(questionnaireSchema.parse({ ...defaultQuestionnaire, ...changes }), null);
}

/** An invented estimate: total time and memory as given, one tenth of the time for set-up, ranges of a factor 1.5. */
export function estimateOf(totalSeconds: number, memoryGiB = 1, spread = 1.5): Estimate {
  return {
    iterations: spreadRange(40, spread),
    iterationBound: null,
    memoryGiB: spreadRange(memoryGiB, spread),
    setupSeconds: spreadRange(0.1 * totalSeconds, spread),
    solveSeconds: spreadRange(0.9 * totalSeconds, spread),
    totalSeconds: spreadRange(totalSeconds, spread),
    factorEntries: null,
    factorFlops: null,
    spectralInterval: null,
    basis: "theory-only",
    parameters: {},
    notes: [],
    why: [],
  };
}

/** The first strategy takes 10 s, each later one 10 s more; some may be given. */
export function estimatesWith(given: Partial<Record<StrategyId, Estimate>> = {}): Estimates {
  return byStrategy((strategy) => given[strategy] ?? estimateOf(10 * (1 + strategyIds.indexOf(strategy))));
}

/** Strategies that need nothing; each falls back on the next in the list. */
export function traitsWith(given: Partial<Record<StrategyId, Partial<StrategyTraits>>> = {}): Record<StrategyId, StrategyTraits> {
  return byStrategy((id) => ({
    id,
    name: id,
    needs: [],
    discretisations,
    notForReason: "",
    fallback: { strategy: strategyIds[(strategyIds.indexOf(id) + 1) % strategyIds.length] ?? id, when: "it stalls" },
    ...given[id],
  }));
}
