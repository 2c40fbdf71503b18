import type { Answers } from "@/lib/questionnaire/answers";
import type { Estimate } from "@/lib/estimates/estimate";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { Sizes } from "@/lib/sizes/sizes";
import type { Facts, FactValue } from "@/rules/fact";
import { noTimeLimitSeconds } from "@/rules/facts/of-answers";
import { factPrefixes, strategyFactSuffixNames, type StrategyFactSuffix } from "@/rules/facts/of-strategies";

/** The estimate of each strategy. */
export type Estimates = Readonly<Record<StrategyId, Estimate>>;

/** Recorded runs that speak in the evidence factors, by strategy. */
export type EvidenceCounts = Readonly<Record<StrategyId, number>>;

/** All facts of the registry for one case, always complete; the same input gives the same facts in the same order. */
export function deriveFacts(answers: Answers, sizes: Sizes, estimates: Estimates, counts: EvidenceCounts): Facts {
  const facts: Record<string, FactValue> = { ...factsOfAnswers(answers), ...factsOfSizes(answers, sizes), ...comparedFacts(estimates, counts) };
  const memoryTotalGiB = machineMemoryGiB(answers);
  const timeLimitSeconds = answers.hardware.timeLimitSeconds ?? noTimeLimitSeconds;
  for (const strategy of strategyIds) {
    const prefix = factPrefixes[strategy];
    const own = factsOfStrategy(estimates[strategy], counts[strategy], memoryTotalGiB, timeLimitSeconds);
    for (const suffix of strategyFactSuffixNames) facts[prefix + suffix] = own[suffix];
  }
  return facts;
}

/** Memory of all nodes used, GiB. */
export function machineMemoryGiB({ hardware }: Pick<Answers, "hardware">): number {
  return hardware.nodes * hardware.memoryPerNodeGiB;
}

function factsOfAnswers(answers: Answers): Record<string, FactValue> {
  const { hardware } = answers;
  return {
    discretisation: answers.discretisation,
    degree: answers.degree,
    meshFamily: answers.meshFamily,
    anisotropy: answers.anisotropy,
    aspectRatio: answers.aspectRatio,
    contrastRatio: answers.contrast.ratio,
    contrastPattern: answers.contrast.pattern,
    boundary: answers.boundary,
    cores: hardware.cores,
    nodes: hardware.nodes,
    memoryPerNodeGiB: hardware.memoryPerNodeGiB,
    memoryTotalGiB: machineMemoryGiB(answers),
    networkLatencyMicroseconds: hardware.networkLatencyMicroseconds,
    timeLimitGiven: hardware.timeLimitSeconds !== null,
    timeLimitSeconds: hardware.timeLimitSeconds ?? noTimeLimitSeconds,
    tolerance: answers.tolerance,
    repeatedSolves: answers.repeatedSolves,
    priority: answers.priority,
    available: answers.available,
  };
}

function factsOfSizes({ hardware }: Answers, sizes: Sizes): Record<string, FactValue> {
  return {
    cells: sizes.cells,
    faces: sizes.faces,
    facesPerCell: sizes.facesPerCell,
    spacing: sizes.spacing,
    unknowns: sizes.unknowns,
    velocityUnknowns: sizes.velocityUnknowns,
    pressureUnknowns: sizes.pressureUnknowns,
    nonzeros: sizes.nonzeros.total,
    schurNonzeros: sizes.schurNonzeros,
    unknownsPerCore: sizes.unknowns / hardware.cores,
    countsExact: sizes.exact,
  };
}

/** Ties go to the strategy that is listed first. */
function comparedFacts(estimates: Estimates, counts: EvidenceCounts): Record<string, FactValue> {
  const total = (strategy: StrategyId) => estimates[strategy].totalSeconds.median;
  const fastestStrategy = strategyIds.reduce((best, strategy) => (total(strategy) < total(best) ? strategy : best));
  const fastest = total(fastestStrategy);
  return {
    fastestStrategy,
    directToFastestRatio: fastest > 0 ? total("direct-ldlt") / fastest : 1,
    evidenceRuns: strategyIds.reduce((sum, strategy) => sum + counts[strategy], 0),
  };
}

function factsOfStrategy(estimate: Estimate, runs: number, memoryTotalGiB: number, timeLimitSeconds: number): Record<StrategyFactSuffix, number> {
  const { iterations, memoryGiB, setupSeconds, solveSeconds, totalSeconds } = estimate;
  return {
    Iterations: iterations.median,
    MemoryGiB: memoryGiB.median,
    MemoryShare: memoryGiB.median / memoryTotalGiB,
    HighMemoryShare: memoryGiB.high / memoryTotalGiB,
    SetupSeconds: setupSeconds.median,
    SolveSeconds: solveSeconds.median,
    TotalSeconds: totalSeconds.median,
    SetupShare: totalSeconds.median > 0 ? setupSeconds.median / totalSeconds.median : 0,
    TimeLimitShare: totalSeconds.median / timeLimitSeconds,
    EvidenceRuns: runs,
  };
}
