import type { Estimate } from "@/lib/estimates/estimate";
import type { Answers } from "@/lib/questionnaire/answers";
import type { Outcome } from "@/lib/runs/run";
import { normalFrom } from "@/lib/shared/random";
import type { StrategyId } from "@/lib/shared/strategy-ids";

export type SimulatedRun = {
  strategy: StrategyId;
  outcome: Outcome;
  reason: string | null;
  iterations: number | null;
  setupSeconds: number | null;
  solveSeconds: number | null;
  peakMemoryGiB: number | null;
  trueRelativeResidual: number | null;
  monitoredRelativeResidual: number | null;
  monitoredNorm: string | null;
  note: string;
};

/**
 * What the invented machines do that the model does not know: a factor on time and one on iterations by strategy.
 * Chosen so that the advice is sometimes wrong; nothing here was measured.
 */
const hiddenTruth: Partial<Record<StrategyId, { time: number; iterations: number }>> = {
  "direct-ldlt": { time: 0.8, iterations: 1 },
  "schur-diag-amg": { time: 1.7, iterations: 1.25 },
  "regularized-amg": { time: 1.3, iterations: 1.4 },
  "hybridized-amg": { time: 0.7, iterations: 0.9 },
  "schur-triangular": { time: 1.15, iterations: 1.05 },
};

/** Deliberate surprises: multigrid on a rough coefficient stalls, a diagonal test hides the true residual, factors outgrow their estimate. */
function surprise(strategy: StrategyId, answers: Answers, random: () => number): Outcome | "own-test-only" | null {
  const { ratio, pattern } = answers.contrast;
  const draw = random();
  if (strategy === "schur-diag-amg" && ratio >= 1e4 && draw < 0.5) return "stalled";
  if (strategy === "schur-triangular" && ratio >= 1e4 && draw < 0.3) return "stalled";
  if (strategy === "schur-diag-direct" && ratio >= 1e4 && draw < 0.35) return "own-test-only";
  if (strategy === "schwarz-two-level" && pattern === "random-field" && draw < 0.6) return "stalled";
  if (strategy === "regularized-amg" && answers.degree >= 3 && draw < 0.5) return "over-time";
  if (draw > 0.95) return "broken";
  return draw > 0.9 ? "stalled" : null;
}

/** One invented run around an estimate: hidden truth, lognormal noise, and now and then a surprise. */
export function simulateRun(strategy: StrategyId, answers: Answers, estimate: Estimate, random: () => number): SimulatedRun {
  const truth = hiddenTruth[strategy] ?? { time: 1, iterations: 1 };
  // Now and then a node is shared with a hungry neighbour, and the run takes two to three times as long.
  const crowded = random() < 0.12 ? 2 + random() : 1;
  const noise = (sigma: number) => Math.exp(sigma * normalFrom(random));
  const memoryGiB = estimate.memoryGiB.median * noise(0.12);
  const iterative = estimate.iterations.high > 1;
  const iterations = iterative ? Math.max(2, Math.round(estimate.iterations.median * truth.iterations * noise(0.12))) : null;
  const run: SimulatedRun = {
    strategy,
    outcome: "converged",
    reason: null,
    iterations,
    setupSeconds: figures(estimate.setupSeconds.median * truth.time * crowded * noise(0.2)),
    solveSeconds: figures(estimate.solveSeconds.median * truth.time * crowded * noise(0.25)),
    peakMemoryGiB: figures(memoryGiB),
    trueRelativeResidual: figures(answers.tolerance * (0.2 + 1.5 * random())),
    monitoredRelativeResidual: iterative ? figures(answers.tolerance * (0.5 + 0.5 * random())) : null,
    monitoredNorm: iterative ? "preconditioned" : "none",
    note: "",
  };
  if (memoryGiB > answers.hardware.memoryPerNodeGiB * answers.hardware.nodes) {
    return failed(run, "out-of-memory", "Killed while factorising.");
  }
  return withSurprise(run, surprise(strategy, answers, random), answers);
}

function withSurprise(run: SimulatedRun, event: Outcome | "own-test-only" | null, answers: Answers): SimulatedRun {
  if (event === null || event === "converged") return run;
  if (event === "own-test-only") {
    return { ...run, trueRelativeResidual: figures(answers.tolerance * 240), note: "Its own test was met; the true residual was not." };
  }
  if (event === "stalled") return { ...failed(run, "stalled", "Residual flat for 200 iterations."), iterations: 500, setupSeconds: run.setupSeconds };
  if (event === "over-time") return failed(run, "over-time", "Cancelled by the queue.");
  return { ...failed(run, event, ""), reason: "The job script named a library that was not loaded." };
}

function failed(run: SimulatedRun, outcome: Outcome, note: string): SimulatedRun {
  return { ...run, outcome, note, iterations: null, setupSeconds: null, solveSeconds: null, trueRelativeResidual: null, monitoredRelativeResidual: null };
}

/** To three significant digits, as people write measurements down. */
function figures(value: number): number {
  return Number(value.toPrecision(3));
}
