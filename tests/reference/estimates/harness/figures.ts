import { constants, fittedConstants } from "@/lib/estimates/constants";
import { residualLag } from "@/lib/estimates/residual-lag";
import { advisedGamma } from "@/lib/strategies/regularisation";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { caseOf, predict, predictCount, type RunCase } from "./predict-run";
import type { MeasuredRun } from "./read-runs";

/** A measured figure beside the model's, as ratio model / measured. */
export type Comparison = { runCase: RunCase; ratio: number };

const solved = new Set(["ok", "converged_but_wrong"]);

export function casesOf(runs: readonly MeasuredRun[]): RunCase[] {
  return runs.flatMap((run) => (solved.has(run.status) ? (caseOf(run) ?? []) : []));
}

/** Factor entries of the direct solver above 5 000 unknowns. */
export function entryComparisons(cases: readonly RunCase[]): Comparison[] {
  return cases.flatMap((runCase) => {
    const { run, strategy } = runCase;
    const measured = run.mumps_infog29_entries;
    if (strategy !== "direct-ldlt" || measured === null || run.unknowns_total <= 5000) return [];
    return [{ runCase, ratio: (predict(runCase).factor?.entries ?? NaN) / measured }];
  });
}

/** Growth exponents of the entries with the unknowns, for each family, degree, ordering and factorisation with at least three sizes. */
export function growthExponents(cases: readonly RunCase[]): { name: string; measured: number; predicted: number }[] {
  const groups = new Map<string, Map<number, { measured: number; predicted: number }>>();
  for (const runCase of cases) {
    const { run, variant } = runCase;
    if (runCase.strategy !== "direct-ldlt" || run.mumps_infog29_entries === null || run.contrast > 1 || run.bc !== "flux") continue;
    const name = `${run.mesh_family} ${run.family}${run.degree} ${variant.factorisation} ordering ${run.mumps_infog7_ordering}`;
    const sizes = groups.get(name) ?? new Map<number, { measured: number; predicted: number }>();
    sizes.set(run.unknowns_total, { measured: run.mumps_infog29_entries, predicted: predict(runCase).factor?.entries ?? NaN });
    groups.set(name, sizes);
  }
  return [...groups].flatMap(([name, sizes]) => {
    if (sizes.size < 3) return [];
    const points = [...sizes].map(([unknowns, entries]) => ({ x: Math.log(unknowns), measured: Math.log(entries.measured), predicted: Math.log(entries.predicted) }));
    return [{ name, measured: slope(points.map((p) => [p.x, p.measured])), predicted: slope(points.map((p) => [p.x, p.predicted])) }];
  });
}

/** Outer iterations in the monitored norm of the given strategies. */
export function iterationComparisons(cases: readonly RunCase[], strategies: readonly string[]): Comparison[] {
  return cases.flatMap((runCase) => {
    const { iterations } = runCase.run;
    if (!strategies.includes(runCase.strategy) || iterations === null) return [];
    return [{ runCase, ratio: predictCount(runCase).expected / iterations }];
  });
}

/** Lag of the true residual behind the monitored one, MINRES with a diagonal Schur preconditioner, right-hand sides with wells. */
export function lagComparisons(cases: readonly RunCase[]): Comparison[] {
  return cases.flatMap((runCase) => {
    const { run, answers, strategy, variant } = runCase;
    const diagonal = strategy === "schur-diag-direct" || strategy === "schur-diag-amg";
    if (!diagonal || variant.krylov !== "minres" || run.rhs !== "wells" || run.true_rel_residual === null) return [];
    const { lag } = residualLag("block-diagonal", { answers, sizes: computeSizes(answers), constants });
    return [{ runCase, ratio: lag / Math.max(1, run.true_rel_residual / run.rtol) }];
  });
}

/** Runs of MINRES with an exact Schur complement that took more iterations than the bound proves. */
export function aboveBound(cases: readonly RunCase[]): { checked: number; above: RunCase[] } {
  const bounded = cases.filter(({ strategy, variant }) => strategy === "schur-diag-direct" && variant.krylov === "minres");
  const checked = bounded.filter((runCase) => predictCount(runCase).bound !== null);
  return { checked: checked.length, above: checked.filter((runCase) => (runCase.run.iterations ?? 0) > (predictCount(runCase).bound ?? Infinity)) };
}

/** One core, alone on the machine, with times. */
export function timedCases(cases: readonly RunCase[]): RunCase[] {
  return cases.filter(({ run, strategy }) => run.concurrent_jobs === 1 && strategy !== "regularized-amg" && secondsOf(run) !== null);
}

export function secondsOf(run: MeasuredRun): { setup: number; solve: number } | null {
  if (run.setup_wall_s === null || run.solve_wall_s === null || run.iterations === null) return null;
  return { setup: run.setup_wall_s + (run.form_wall_s ?? 0), solve: run.solve_wall_s };
}

/** True relative residual at which times are compared. */
export const equalResidual = 1e-6;

/**
 * Total seconds at a true relative residual of `equalResidual`: convergence is linear, so the solve time scales with the digits; a factorisation reaches it in one substitution.
 */
export function secondsAtEqualResidual(run: MeasuredRun): number | null {
  const seconds = secondsOf(run);
  if (seconds === null) return null;
  if (run.solver === "S1") return seconds.setup + seconds.solve;
  const reached = run.true_rel_residual;
  if (reached === null || reached <= 0 || reached >= 1e-2) return null;
  return seconds.setup + seconds.solve * (Math.log(2 / equalResidual) / Math.log(2 / reached));
}

export function timeComparisons(cases: readonly RunCase[]): Comparison[] {
  return timedCases(cases).flatMap((runCase) => {
    const measured = secondsAtEqualResidual(runCase.run);
    if (measured === null || measured < 0.1) return [];
    const { setupSeconds, solveSeconds } = predict(runCase, { trueTolerance: equalResidual });
    return [{ runCase, ratio: (setupSeconds + solveSeconds) / measured }];
  });
}

/** Pairs of ways of solving one and the same system on as many cores that differ by more than `factor` in measured time. */
export function pairsCalledRight(cases: readonly RunCase[], factor: number): { pairs: number; right: number } {
  const groups = new Map<string, { measured: number; predicted: number }[]>();
  for (const runCase of timedCases(cases)) {
    const { run } = runCase;
    const measured = secondsAtEqualResidual(run);
    if (measured === null || measured < 0.1) continue;
    const key = [run.mesh_family, run.n_div, run.family, run.degree, run.contrast, run.pattern, run.bc, run.rhs, run.ranks].join(" ");
    const { setupSeconds, solveSeconds } = predict(runCase, { trueTolerance: equalResidual });
    groups.set(key, [...(groups.get(key) ?? []), { measured, predicted: setupSeconds + solveSeconds }]);
  }
  let pairs = 0;
  let right = 0;
  for (const group of groups.values()) {
    group.forEach((a, index) => {
      for (const b of group.slice(index + 1)) {
        const ratio = a.measured / b.measured;
        if (Math.max(ratio, 1 / ratio) <= factor) continue;
        pairs += 1;
        if (ratio > 1 === a.predicted > b.predicted) right += 1;
      }
    });
  }
  return { pairs, right };
}

/** For each gamma sweep: iterations at the advised gamma, interpolated between measured ones, over the best measured. */
export function gammaSweeps(runs: readonly MeasuredRun[]): { name: string; ratio: number }[] {
  const sweeps = new Map<string, { run: MeasuredRun; overH2: number; iterations: number }[]>();
  for (const run of runs) {
    if (run.solver !== "S4" || !/gamg|hypre/.test(run.variant) || run.contrast > 1 || run.gamma === null || run.iterations === null || run.status !== "ok") continue;
    const name = `${run.mesh_family} ${run.family}${run.degree} n=${run.n_div} ${run.variant}`;
    const overH2 = 1 / run.gamma / run.cells ** (-2 / 3);
    sweeps.set(name, [...(sweeps.get(name) ?? []), { run, overH2, iterations: run.iterations }]);
  }
  return [...sweeps].map(([name, points]) => {
    points.sort((a, b) => a.overH2 - b.overH2);
    const best = Math.min(...points.map((point) => point.iterations));
    const [first] = points;
    const asked = first ? caseOf(first.run) : null;
    const advised = asked ? advisedGamma({ answers: asked.answers, sizes: computeSizes(asked.answers) }).overH2 : NaN;
    return { name, ratio: interpolated(points, advised) / best };
  });
}

function interpolated(points: readonly { overH2: number; iterations: number }[], at: number): number {
  for (let i = 1; i < points.length; i += 1) {
    const [low, high] = [points[i - 1], points[i]];
    if (!low || !high || at < low.overH2 || at > high.overH2) continue;
    const share = Math.log(at / low.overH2) / Math.log(high.overH2 / low.overH2);
    return low.iterations ** (1 - share) * high.iterations ** share;
  }
  return NaN;
}

export function shareWithin(comparisons: readonly Comparison[], factor: number): number {
  return comparisons.filter(({ ratio }) => ratio <= factor && ratio >= 1 / factor).length / comparisons.length;
}

/** Share of counts within plus or minus `part` of the measured one. */
export function shareWithinPart(comparisons: readonly Comparison[], part: number): number {
  return comparisons.filter(({ ratio }) => Math.abs(ratio - 1) <= part).length / comparisons.length;
}

export function constantCounts(): { fitted: number; all: number } {
  return { fitted: Object.keys(fittedConstants).length, all: Object.keys(constants).length };
}

function slope(points: readonly (readonly [number, number])[]): number {
  const n = points.length;
  const meanX = points.reduce((sum, [x]) => sum + x, 0) / n;
  const meanY = points.reduce((sum, [, y]) => sum + y, 0) / n;
  const covariance = points.reduce((sum, [x, y]) => sum + (x - meanX) * (y - meanY), 0);
  return covariance / points.reduce((sum, [x]) => sum + (x - meanX) ** 2, 0);
}
