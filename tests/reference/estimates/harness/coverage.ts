import { spreadQuantile } from "./quantiles";
import { predict, type RunCase } from "./predict-run";
import { secondsOf } from "./figures";

export const quantities = ["iterations", "memory", "setup", "solve"] as const;
export type Quantity = (typeof quantities)[number];

/** ln(measured / predicted) of one quantity of one run. */
export type Residual = { runCase: RunCase; accuracy: string; quantity: Quantity; value: number };

const mebibyte = 2 ** 20;
/** Resident memory of the measuring program itself, a rank. */
const interpreterMebibytes = 73;

/** Residuals of all runs: counts of every run, memory above 150 MiB and times above the clock's noise of runs that were alone. */
export function residuals(cases: readonly RunCase[]): Residual[] {
  return cases.flatMap((runCase) => {
    const { run, strategy } = runCase;
    if (strategy === "regularized-amg") return [];
    const cost = predict(runCase);
    const found: Residual[] = [];
    const add = (quantity: Quantity, measured: number, predicted: number) =>
      found.push({ runCase, accuracy: cost.accuracy, quantity, value: Math.log(measured / predicted) });
    if (run.iterations !== null && strategy !== "direct-ldlt") add("iterations", run.iterations, cost.iterations);
    if (run.concurrent_jobs !== 1) return found;
    const seconds = secondsOf(run);
    if (seconds && seconds.setup > 0.02) add("setup", seconds.setup, cost.setupSeconds);
    if (seconds && seconds.solve > 0.01) add("solve", seconds.solve, cost.solveSeconds);
    const peak = run.rss_peak_MiB_sum;
    if (peak !== null && peak > 150 * run.ranks) add("memory", peak - interpreterMebibytes * run.ranks, cost.memoryBytes / mebibyte);
    return found;
  });
}

/**
 * Share of left-out residuals inside 80 % ranges made from the others: for each group of `fold`, spreads of every class of models are taken from the runs outside
 * it. `quantity` null pools all of them.
 */
export function leaveOutCoverage(all: readonly Residual[], fold: (runCase: RunCase) => string): { inside: number; count: number } {
  const folds = new Set(all.map(({ runCase }) => fold(runCase)));
  let inside = 0;
  let count = 0;
  for (const left of folds) {
    const spreads = spreadsOf(all.filter(({ runCase }) => fold(runCase) !== left));
    for (const residual of all) {
      if (fold(residual.runCase) !== left) continue;
      const spread = spreads.get(`${residual.accuracy} ${residual.quantity}`);
      if (spread === undefined) continue;
      count += 1;
      if (Math.abs(residual.value) <= Math.log(spread)) inside += 1;
    }
  }
  return { inside, count };
}

/** 80 % spreads (factors) by class and quantity. */
export function spreadsOf(all: readonly Residual[]): Map<string, number> {
  const groups = new Map<string, number[]>();
  for (const { accuracy, quantity, value } of all) {
    const key = `${accuracy} ${quantity}`;
    groups.set(key, [...(groups.get(key) ?? []), Math.abs(value)]);
  }
  return new Map([...groups].map(([key, values]) => [key, Math.exp(spreadQuantile(values, 0.8))]));
}
