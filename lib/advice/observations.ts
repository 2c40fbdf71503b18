import { estimateAll } from "@/lib/estimates/estimate-all";
import type { Answers } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { compileRuleSet, type CompiledRuleSet } from "@/rules/compile";
import type { RuleSet } from "@/rules/rule-schema";
import { ruleFactors } from "./effects";
import { byStrategy, fitEvidence, type EvidenceModel, type Observation } from "./evidence";
import { evidenceFeaturesOf } from "./evidence-features";
import { deriveFacts, type EvidenceCounts } from "./facts";
import type { RecordedCase } from "./nearest-cases";

/** A converged run with its times: `totalSeconds` = set-up + repeatedSolves x solve, on `cores`. `strategy` is null for ones not among ours. */
export type TimedRun = { strategy: StrategyId | null; strategyName: string; cores: number; totalSeconds: number };

/** A past case with its runs that converged, carry times and were not withdrawn. */
export type RecordedRuns = { caseId: string; caseNumber: number; title: string; answers: Answers; runs: readonly TimedRun[] };

/** All that the pipeline needs of a team's record. `asOf` is the moment up to which it was read, ISO 8601; `runs` those that speak. */
export type Evidence = { model: EvidenceModel; asOf: string; runs: number; recordedCases: readonly RecordedCase[] };

/**
 * Read a team's record under one edition: residuals of its runs against model and rules of today, fitted by strategy, and the past cases
 * to be named. Runs by other strategies count for the best of a case only. Runs without a positive time are left out.
 */
export function readRecord(record: readonly RecordedRuns[], ruleSet: RuleSet, asOf: string): Evidence {
  const timed = record.map((past) => ({ ...past, runs: past.runs.filter(({ totalSeconds }) => totalSeconds > 0) }));
  const observations = observationsOf(timed, ruleSet);
  return { model: fitEvidence(observations), asOf, runs: observations.length, recordedCases: timed.flatMap(recordedCaseOf) };
}

/**
 * One observation per run: ln(measured / (model x rules' factors)). The rules see the run counts of the whole record, which don't depend on
 * residuals, so that nothing turns in a circle.
 */
export function observationsOf(record: readonly RecordedRuns[], ruleSet: RuleSet): Observation[] {
  const compiled = compileRuleSet(ruleSet);
  const counts = countRuns(record);
  return record.flatMap((past) => observationsOfCase(past, compiled, counts));
}

function countRuns(record: readonly RecordedRuns[]): EvidenceCounts {
  const counts = byStrategy(() => 0);
  for (const { runs } of record) for (const { strategy } of runs) if (strategy !== null) counts[strategy] += 1;
  return counts;
}

function observationsOfCase({ caseId, answers, runs }: RecordedRuns, compiled: CompiledRuleSet, counts: EvidenceCounts): Observation[] {
  const byCores = new Map<number, ReturnType<typeof predict>>();
  return runs.flatMap(({ strategy, cores, totalSeconds }) => {
    if (strategy === null) return [];
    const predicted = byCores.get(cores) ?? predict(onCores(answers, cores), compiled, counts);
    byCores.set(cores, predicted);
    return [{ caseId, strategy, features: predicted.features, logResidual: Math.log(totalSeconds / predicted.totalSeconds[strategy]) }];
  });
}

function predict(answers: Answers, compiled: CompiledRuleSet, counts: EvidenceCounts) {
  const sizes = computeSizes(answers);
  const estimates = estimateAll(answers, sizes);
  const factors = ruleFactors(compiled.fired(deriveFacts(answers, sizes, estimates, counts)));
  return {
    features: evidenceFeaturesOf(answers, sizes),
    totalSeconds: byStrategy((strategy) => estimates[strategy].totalSeconds.median * factors[strategy]),
  };
}

/** The same case on as many cores as the run had, nodes filled as before. */
function onCores(answers: Answers, cores: number): Answers {
  const { hardware } = answers;
  if (cores === hardware.cores) return answers;
  return { ...answers, hardware: { ...hardware, cores, nodes: Math.ceil(cores / hardware.coresPerNode) } };
}

function recordedCaseOf({ caseId, caseNumber, title, answers, runs }: RecordedRuns): RecordedCase[] {
  const [first, ...others] = runs;
  if (first === undefined) return [];
  const best = others.reduce((fastest, run) => (run.totalSeconds < fastest.totalSeconds ? run : fastest), first);
  return [
    {
      id: caseId,
      number: caseNumber,
      title,
      features: evidenceFeaturesOf(answers, computeSizes(answers)),
      runs: runs.length,
      best: { strategy: best.strategy ?? best.strategyName, totalSeconds: best.totalSeconds },
    },
  ];
}
