import { estimateAll } from "@/lib/estimates/estimate-all";
import { modelVersion } from "@/lib/estimates/model-version";
import type { Answers } from "@/lib/questionnaire/answers";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { strategies } from "@/lib/strategies/index";
import { fireRules } from "@/rules/engine";
import { parseFacts } from "@/rules/facts";
import type { RuleSet } from "@/rules/rule-schema";
import type { Advice, RankingEntry } from "./advice";
import { collectEffects } from "./effects";
import { byStrategy, evidenceCounts, evidenceFactor } from "./evidence";
import { evidenceFeaturesOf } from "./evidence-features";
import { deriveFacts } from "./facts";
import { nearestCases } from "./nearest-cases";
import type { Evidence } from "./observations";
import { rankStrategies } from "./rank";

export type AdviceInput = {
  answers: Answers;
  ruleSet: RuleSet;
  editionNumber: number;
  evidence: Evidence;
  /** The case that is advised, so that it is not named as its own neighbour. */
  caseId?: string | null;
};

/**
 * From answers to advice: sizes -> estimates -> facts -> rules -> effects -> ranking. No clock and no chance in it: the same input gives
 * the same advice, byte for byte in JSON. Rejects where the rule set names a fact that does not exist (editions are validated before).
 */
export async function computeAdvice({ answers, ruleSet, editionNumber, evidence, caseId = null }: AdviceInput): Promise<Advice> {
  const sizes = computeSizes(answers);
  const estimates = estimateAll(answers, sizes);
  const facts = parseFacts(deriveFacts(answers, sizes, estimates, evidenceCounts(evidence.model)));
  const fired = await fireRules(ruleSet, facts);
  const effects = collectEffects(fired);
  const features = evidenceFeaturesOf(answers, sizes);
  const factors = byStrategy((strategy) => evidenceFactor(evidence.model, strategy, features));
  const ranking = rankStrategies({ answers, traits: strategies, estimates, effects, evidence: factors });
  return {
    edition: { number: editionNumber },
    modelVersion,
    evidence: { asOf: evidence.asOf, runs: evidence.runs },
    sizes,
    ranking,
    firedRules: fired.map(({ rule }) => rule.id),
    cautions: [...lineCautions(ranking), ...effects.cautions],
    nearestCases: nearestCases(features, evidence.recordedCases, caseId),
  };
}

function lineCautions(ranking: readonly RankingEntry[]): string[] {
  if (ranking.some(({ status }) => status === "ranked")) return [];
  return ["No strategy may compete: each stands below with its reason. More memory, more of what the program supplies, or another rule would change that."];
}
