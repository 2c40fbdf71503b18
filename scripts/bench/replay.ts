import { compareReplays, replayRuleSet } from "@/lib/refinement/replay";
import { prepareReplay } from "@/lib/refinement/prepare-replay";
import { replayCaseFromModel, type ReplayCase } from "@/lib/refinement/replay-case";
import { toAnswers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { caseLimits } from "@/lib/runs/case-limits";
import type { ComparedRun, HitRateRecord } from "@/lib/hit-rates/record";
import { seededRandom } from "@/lib/shared/random";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { buildEngine } from "@/rules/engine";
import type { RuleSet } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";

const caseCount = 10_000;
const ruleCount = 40;
const limitSeconds = 3;
const leastRatio = 20;
/** Cases made by the model; the others vary their facts, which rules alone look at. */
const modelledCases = 100;
/** Cases that json-rules-engine runs on; its time is scaled to all. */
const sampleCount = 300;

void main();

/** Time a whole replay, and its rules against json-rules-engine case by case, in one process; fail where a figure does not hold. */
async function main(): Promise<void> {
  const cases = makeCases();
  const live = rulesOf(ruleCount);
  const draft = live.map((rule, index) => (index % 4 === 0 ? { ...rule, enabled: !rule.enabled } : rule));
  const { seconds: wholeSeconds, result } = await timed(() => compareReplays(prepareReplay(cases), live, draft));
  const { seconds: rulesSeconds } = await timed(() => replayRuleSet(prepareReplay(cases), live));
  const engine = buildEngine(live);
  const sample = cases.filter((_, index) => index % Math.floor(caseCount / sampleCount) === 0).slice(0, sampleCount);
  const { seconds: sampleSeconds } = await timed(async () => {
    for (const { facts } of sample) await engine.run(facts);
  });
  const engineSeconds = (sampleSeconds * caseCount) / sample.length;
  const ratio = engineSeconds / rulesSeconds;
  console.log(`replay: ${caseCount} cases x ${ruleCount} rules, live against draft, ${result.changed.cases} first choices changed: ${wholeSeconds.toFixed(2)} s, limit ${limitSeconds} s`);
  console.log(
    `replay: one rule set ${rulesSeconds.toFixed(3)} s, json-rules-engine case by case ${engineSeconds.toFixed(1)} s (from ${sample.length} cases), ${ratio.toFixed(0)}x faster, at least ${leastRatio}x`,
  );
  if (wholeSeconds > limitSeconds || ratio < leastRatio) process.exitCode = 1;
}

function rulesOf(count: number): RuleSet {
  return Array.from({ length: count }, (_, index) => {
    const rule = firstEdition[index % firstEdition.length];
    if (rule === undefined) throw new RangeError("The first edition has no rules.");
    return { ...rule, id: `${rule.id}-${index}` };
  });
}

function makeCases(): ReplayCase[] {
  const random = seededRandom(1);
  const modelled = Array.from({ length: modelledCases }, (_, index) => modelledCase(index, random));
  return Array.from({ length: caseCount }, (_, index) => {
    const base = modelled[index % modelledCases];
    if (base === undefined) throw new RangeError("No case was made.");
    const unknowns = Math.round(10 ** (4 + 4 * random()));
    return { ...base, record: { ...base.record, caseId: `case-${index}`, caseNumber: index + 1 }, facts: { ...base.facts, unknowns, contrastRatio: 10 ** Math.floor(9 * random()) } };
  });
}

function modelledCase(index: number, random: () => number): ReplayCase {
  const value = Math.round(10 ** (4 + 3 * random()));
  const questionnaire = { ...defaultQuestionnaire, degree: 1 + (index % 3), size: { by: "unknowns", value } };
  const answers = toAnswers(questionnaireSchema.parse(questionnaire), null);
  const measured = strategyIds.filter(() => random() < 0.4);
  const record: HitRateRecord = {
    caseId: `case-${index}`,
    caseNumber: index + 1,
    discretisation: answers.discretisation,
    degree: answers.degree,
    meshFamily: answers.meshFamily,
    limits: caseLimits(answers),
    advice: { id: `advice-${index}`, editionNumber: 1, firstStrategy: null, firedRules: [], givenAt: "2026-11-01T00:00:00.000Z" },
    advisedRun: null,
    otherRuns: measured.map((strategy): ComparedRun => ({
      runId: `run-${index}-${strategy}`,
      strategy,
      outcome: random() < 0.9 ? "converged" : "stalled",
      iterations: 30,
      setupSeconds: 5 * random(),
      solveSeconds: 20 * random(),
      peakMemoryGiB: 4,
      cores: answers.hardware.cores,
      trueRelativeResidual: answers.tolerance,
      measuredAt: "2026-11-02T00:00:00.000Z",
    })),
  };
  return replayCaseFromModel(record, answers);
}

async function timed<Result>(work: () => Result | Promise<Result>): Promise<{ seconds: number; result: Result }> {
  const started = performance.now();
  const result = await work();
  return { seconds: (performance.now() - started) / 1000, result };
}
