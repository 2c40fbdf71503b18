import { estimateAll } from "@/lib/estimates/estimate-all";
import { measuredSpreads } from "@/lib/estimates/ranges";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { caseAnswers } from "@/tests/support/case-answers";
import { leaveOutCoverage, residuals, spreadsOf } from "./coverage";
import {
  aboveBound,
  casesOf,
  constantCounts,
  entryComparisons,
  gammaSweeps,
  growthExponents,
  iterationComparisons,
  lagComparisons,
  pairsCalledRight,
  shareWithin,
  shareWithinPart,
  timeComparisons,
} from "./figures";
import type { RunCase } from "./predict-run";
import { readRuns } from "./read-runs";

/** One figure that the estimates are held to. */
export type Figure = { name: string; value: number; lowest: number; highest: number };

export function holds({ value, lowest, highest }: Figure): boolean {
  return value >= lowest && value <= highest;
}

/** Every figure with its threshold, computed from the reference runs and the models as they stand. */
export function mustHoldFigures(): Figure[] {
  const runs = readRuns();
  const cases = casesOf(runs);
  return [...directFigures(cases), ...iterationFigures(cases), ...timeFigures(cases), ...coverageFigures(cases), ...gammaFigures(runs), ...tradeFigures(), ...parsimony(cases)];
}

const atLeast = (name: string, value: number, lowest: number): Figure => ({ name, value, lowest, highest: Infinity });
const atMost = (name: string, value: number, highest: number): Figure => ({ name, value, lowest: -Infinity, highest });

function directFigures(cases: readonly RunCase[]): Figure[] {
  const entries = entryComparisons(cases);
  return [
    atLeast(`Factor entries within a factor 1.5 (share of ${entries.length} direct runs)`, shareWithin(entries, 1.5), 0.8),
    atLeast("Factor entries within a factor 2.5 (share)", shareWithin(entries, 2.5), 1),
    ...growthExponents(cases).map(({ name, measured, predicted }) => atMost(`Growth exponent off by, ${name}`, Math.abs(predicted - measured), 0.15)),
  ];
}

function iterationFigures(cases: readonly RunCase[]): Figure[] {
  const counts = iterationComparisons(cases, ["schur-diag-direct", "schur-diag-amg"]);
  const { checked, above } = aboveBound(cases);
  const lags = lagComparisons(cases);
  return [
    atLeast(`Iterations of the diagonal-Schur strategies within 30 % (share of ${counts.length} runs)`, shareWithinPart(counts, 0.3), 0.8),
    atLeast(`Lag of the true residual within a factor 10 (share of ${lags.length} MINRES runs with wells)`, shareWithin(lags, 10), 0.8),
    atMost(`Runs above the proven bound (of ${checked} where it applies)`, above.length, 0),
  ];
}

function timeFigures(cases: readonly RunCase[]): Figure[] {
  const times = timeComparisons(cases);
  const { pairs, right } = pairsCalledRight(cases, 1.6);
  return [
    atLeast(`Total time at equal true residual within a factor 2 (share of ${times.length} runs)`, shareWithin(times, 2), 0.75),
    atLeast(`Faster of two called right (share of ${pairs} pairs that differ by more than 1.6x)`, right / pairs, 0.85),
  ];
}

function coverageFigures(cases: readonly RunCase[]): Figure[] {
  const all = residuals(cases);
  const figure = (name: string, fold: (runCase: RunCase) => string): Figure => {
    const { inside, count } = leaveOutCoverage(all, fold);
    return { name: `${name} (share of ${count} figures inside their 80 % range)`, value: inside / count, lowest: 0.7, highest: 0.9 };
  };
  const shipped = [...spreadsOf(all)].map(([key, spread]) => Math.abs(Math.log(shippedSpread(key) / spread)));
  return [
    figure("Coverage, one mesh family left out", ({ run }) => run.mesh_family),
    figure("Coverage, one degree left out", ({ run }) => String(run.degree)),
    atMost("Largest factor between a shipped spread and the runs' own", Math.exp(Math.max(...shipped)), 1.3),
  ];
}

function shippedSpread(key: string): number {
  for (const [accuracy, spreads] of Object.entries(measuredSpreads)) {
    for (const [quantity, spread] of Object.entries(spreads)) if (`${accuracy} ${quantity}` === key) return spread;
  }
  return NaN;
}

function gammaFigures(runs: ReturnType<typeof readRuns>): Figure[] {
  return gammaSweeps(runs).map(({ name, ratio }) => atMost(`Iterations at the advised gamma over the best, ${name}`, ratio, 1.15));
}

/** Direct over diagonal Schur with a factorised Schur complement, total time. */
export function directAdvantage(changes: Parameters<typeof caseAnswers>[0]): number {
  const answers = caseAnswers(changes);
  const estimates = estimateAll(answers, computeSizes(answers));
  return estimates["direct-ldlt"].totalSeconds.median / estimates["schur-diag-direct"].totalSeconds.median;
}

function tradeFigures(): Figure[] {
  const onCubes = [1, 2, 3].map((degree) => directAdvantage({ degree }));
  const byFaces = (["cubes", "truncated-octahedra", "voronoi"] as const).map((meshFamily) => directAdvantage({ meshFamily }));
  const [first = NaN, second = NaN, third = NaN] = onCubes;
  const [six = NaN, fourteen = NaN, random = NaN] = byFaces;
  const iterationsOn = (cores: number, strategy: "schur-diag-direct" | "regularized-amg") => {
    const answers = caseAnswers({ hardware: { cores, nodes: 1, memoryPerNodeGiB: 128 } });
    return estimateAll(answers, computeSizes(answers))[strategy].iterations.median;
  };
  const growth = (strategy: "schur-diag-direct" | "regularized-amg") => iterationsOn(32, strategy) / iterationsOn(1, strategy);
  return [
    { name: "Direct over diagonal Schur, 31^3 cubes, degree 1, 32 cores", value: first, lowest: 3, highest: 8 },
    { name: "Direct over diagonal Schur, 22^3 cubes, degree 2, 32 cores", value: second, lowest: 1.3, highest: 3 },
    atMost("Advantage at degree 2 over degree 1", second / first, 1),
    atMost("Advantage at degree 3 over degree 2", third / second, 1),
    atLeast("Advantage on truncated octahedra over cubes, degree 1", fourteen / six, 1),
    atLeast("Advantage on Voronoi cells over truncated octahedra, degree 1", random / fourteen, 1),
    { name: "Iterations of diagonal Schur, 32 processes over 1", value: growth("schur-diag-direct"), lowest: 1, highest: 1 },
    { name: "Iterations of the regularised strategy, 32 processes over 1", value: growth("regularized-amg"), lowest: 1.001, highest: 1.5 },
  ];
}

function parsimony(cases: readonly RunCase[]): Figure[] {
  const figures = residuals(cases).length + entryComparisons(cases).length;
  const { fitted } = constantCounts();
  return [atMost(`Fitted constants (${fitted}) over measured figures that they reproduce (${figures})`, fitted / figures, 0.1)];
}
