import { Engine, type TopLevelCondition } from "json-rules-engine";
import { evidenceCounts, noEvidence } from "@/lib/advice/evidence";
import { deriveFacts } from "@/lib/advice/facts";
import { computeAdvice } from "@/lib/advice/pipeline";
import { estimateAll } from "@/lib/estimates/estimate-all";
import { toAnswers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { firstEdition } from "@/rules/sets/first-edition";

/** The pure pipeline may take this many times one bare json-rules-engine run on the same facts and rules. */
const limit = 10;
const rounds = 300;
const warmUpRounds = 50;

void main();

/** Time both in turn within one process, print the medians and their ratio, and fail above the limit. */
async function main(): Promise<void> {
  const answers = toAnswers(questionnaireSchema.parse(defaultQuestionnaire), null);
  const evidence = { model: noEvidence(), asOf: "2026-12-01T00:00:00.000Z", runs: 0, recordedCases: [] };
  const sizes = computeSizes(answers);
  const facts = deriveFacts(answers, sizes, estimateAll(answers, sizes), evidenceCounts(evidence.model));
  const engine = new Engine(firstEdition.map(({ id, when }) => ({ name: id, conditions: topLevel(when), event: { type: id } })));
  const bare: number[] = [];
  const pipeline: number[] = [];
  for (let round = 0; round < warmUpRounds + rounds; round += 1) {
    const bareMilliseconds = await timed(() => engine.run(facts));
    const pipelineMilliseconds = await timed(() => computeAdvice({ answers, ruleSet: firstEdition, editionNumber: 1, evidence }));
    if (round < warmUpRounds) continue;
    bare.push(bareMilliseconds);
    pipeline.push(pipelineMilliseconds);
  }
  report(median(bare), median(pipeline));
}

function report(bare: number, pipeline: number): void {
  const ratio = pipeline / bare;
  const rules = `${firstEdition.length} rules`;
  console.log(`advice: pure pipeline ${pipeline.toFixed(2)} ms, bare json-rules-engine ${bare.toFixed(2)} ms (${rules}), ratio ${ratio.toFixed(2)}, limit ${limit}`);
  if (ratio > limit) process.exitCode = 1;
}

function topLevel(when: (typeof firstEdition)[number]["when"]): TopLevelCondition {
  return "fact" in when ? { all: [when] } : when;
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const started = performance.now();
  await work();
  return performance.now() - started;
}

function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}
