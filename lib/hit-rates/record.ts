import type { Discretisation, MeshFamily } from "@/lib/questionnaire/answer-sets";
import { isConverged, roundingSlack, runWorked, totalSeconds, type CaseLimits, type MeasuredRun } from "@/lib/runs/comparison";
import { bestMargin, failurePenalty } from "./definitions";

/** A run as it is compared; `strategy` is an id of ours, or "other:" and the name given. */
export type ComparedRun = MeasuredRun & { runId: string; strategy: string; measuredAt: string };

/** One case with the advice judged (or, while its first strategy has no run, the latest) and its compared runs, one a strategy. */
export type HitRateRecord = {
  caseId: string;
  caseNumber: number;
  discretisation: Discretisation;
  degree: number;
  meshFamily: MeshFamily;
  limits: CaseLimits;
  advice: { id: string; editionNumber: number; firstStrategy: string | null; firedRules: readonly string[]; givenAt: string };
  /** The run by the advice's first strategy, recorded after that advice; null when there is none. */
  advisedRun: ComparedRun | null;
  /** Compared runs by every other strategy. */
  otherRuns: readonly ComparedRun[];
};

/** How a case came out. */
export type Judgement = {
  caseId: string;
  /** UTC month of the advised run, such as 2026-11. */
  month: string;
  strategy: string;
  worked: boolean;
  /** Null unless contested with at least one converged run. */
  contest: { best: boolean; regret: number; costs: ReadonlyMap<string, number>; fastestSeconds: number } | null;
  /** Contested, and no run converged: left out of best and regret. */
  leftOut: boolean;
};

/** Null while the advice's first strategy has no compared run. */
export function judge(record: HitRateRecord): Judgement | null {
  const { advisedRun } = record;
  if (advisedRun === null) return null;
  const base = { caseId: record.caseId, month: advisedRun.measuredAt.slice(0, 7), strategy: advisedRun.strategy, worked: runWorked(advisedRun, record.limits) };
  const entrants = [advisedRun, ...record.otherRuns].filter((run) => mayEnterContest(run, record.limits));
  if (entrants.length < 2 || !entrants.includes(advisedRun)) return { ...base, contest: null, leftOut: false };
  const fastest = fastestConverged(entrants, record.limits);
  if (fastest === null) return { ...base, contest: null, leftOut: true };
  return { ...base, contest: contestOf(advisedRun, entrants, record.limits, fastest), leftOut: false };
}

/** A converged run without times enters *worked* only; a failed one has its cost whether timed or not. */
function mayEnterContest(run: ComparedRun, limits: CaseLimits): boolean {
  return !isConverged(run, limits.tolerance) || totalSeconds(run, limits.repeatedSolves) !== null;
}

function contestOf(advised: ComparedRun, entrants: readonly ComparedRun[], limits: CaseLimits, fastestSeconds: number): Judgement["contest"] {
  const costs = costsOf(entrants, limits);
  const advisedCost = costs.get(advised.strategy) ?? Number.POSITIVE_INFINITY;
  const fastestOther = fastestConverged(entrants.filter((run) => run !== advised), limits);
  const converged = isConverged(advised, limits.tolerance);
  return {
    best: converged && (fastestOther === null || advisedCost <= bestMargin * fastestOther * roundingSlack),
    regret: ratioFromOne(advisedCost, fastestSeconds),
    costs,
    fastestSeconds,
  };
}

/** Cost over the fastest, at least 1. Times of zero (below the clock's resolution) are equal to each other. */
export function ratioFromOne(cost: number, fastest: number): number {
  return Math.max(1, Math.max(cost, leastSeconds) / Math.max(fastest, leastSeconds));
}

const leastSeconds = 1e-9;

function costsOf(entrants: readonly ComparedRun[], limits: CaseLimits): ReadonlyMap<string, number> {
  const convergedTotals = entrants.flatMap((run) => convergedTotal(run, limits) ?? []);
  const penalty = failurePenalty * (limits.timeLimitSeconds ?? Math.max(...convergedTotals));
  return new Map(entrants.map((run) => [run.strategy, convergedTotal(run, limits) ?? penalty]));
}

function fastestConverged(runs: readonly ComparedRun[], limits: CaseLimits): number | null {
  const totals = runs.flatMap((run) => convergedTotal(run, limits) ?? []);
  return totals.length === 0 ? null : Math.min(...totals);
}

function convergedTotal(run: ComparedRun, limits: CaseLimits): number | null {
  return isConverged(run, limits.tolerance) ? totalSeconds(run, limits.repeatedSolves) : null;
}
