import type { DiagnosedRun, DiagnosisInput } from "@/lib/runs/diagnosis/diagnosis-input";
import { findings, type Evidence, type FindingId, type FindingSeverity, type FindingSource } from "@/lib/runs/diagnosis/findings";
import { findRestartEffect, findStagnation } from "@/lib/runs/diagnosis/residual-trend";

export type Finding = {
  id: FindingId;
  title: string;
  severity: FindingSeverity;
  text: string;
  whatToTry: string;
  source: FindingSource;
  evidence: Evidence;
  /** Lines of the log that show it, 1-based. */
  lines: number[];
};

type Seen = { evidence: Evidence; lines?: (number | null | undefined)[] };
type Test = (input: DiagnosisInput) => Seen | null;

/** A true residual above this multiple of the tolerance is no success (product definition of "converged"). */
const trueResidualFactor = 10;
/** Thresholds of the trade: common practice, no source. */
const setupShare = 0.8;
const poorEfficiency = 0.5;
const memoryShare = 0.9;
const imbalanceRatio = 1.5;
const divergenceGrowth = 10;

const tests: Record<FindingId, Test> = {
  divergence({ run, parsed }) {
    const first = parsed?.residualHistory[0]?.monitored;
    const last = parsed?.residualHistory.at(-1)?.monitored;
    const growth = first !== undefined && last !== undefined && first > 0 ? last / first : null;
    const grew = growth !== null && growth >= divergenceGrowth && parsed?.monitoredNorm !== "none";
    const reason = parsed?.reason ?? undefined;
    if (!grew && !(run.outcome === "diverged" && reason?.includes("DTOL") === true)) return null;
    if (growth === null) return null;
    return { evidence: { growth, ...(reason === undefined ? {} : { reason }) }, lines: [parsed?.lines["reason"]] };
  },
  "indefinite-system"({ parsed }) {
    const reason = parsed?.reason;
    if (reason !== "DIVERGED_INDEFINITE_MAT" && reason !== "DIVERGED_INDEFINITE_PC") return null;
    return { evidence: { reason }, lines: [parsed?.lines["reason"]] };
  },
  stagnation({ run, parsed }) {
    if (parsed == null || run.outcome === "converged" || parsed.monitoredNorm === "none") return null;
    const found = findStagnation(parsed.residualHistory);
    if (found === null) return null;
    const perDecade = found.decadesPerIteration < 0 ? -1 / found.decadesPerIteration : Number.POSITIVE_INFINITY;
    const iterationsPerDecade = Number.isFinite(perDecade) ? Math.round(perDecade) : "endless";
    const { fromIteration, decadesPerIteration } = found;
    const line = parsed.lines["residualHistory"];
    // Monitors print one line an iteration; with nested output between, the line is only near.
    const at = line === undefined || parsed.historyStride > 1 ? line : line + fromIteration;
    return { evidence: { fromIteration, decadesPerIteration, iterationsPerDecade }, lines: [at] };
  },
  "restart-effect"({ parsed }) {
    if (parsed?.restart == null || parsed.historyStride > 1) return null;
    const found = findRestartEffect(parsed.residualHistory, parsed.restart);
    return found === null ? null : { evidence: { ...found }, lines: [parsed.lines["restart"]] };
  },
  "true-residual-not-met"({ run, parsed, limits }) {
    const { tolerance } = limits;
    const residual = run.trueRelativeResidual;
    const met = run.outcome === "converged" || parsed?.reason?.startsWith("CONVERGED") === true;
    if (!met || tolerance == null || residual == null || !(residual > trueResidualFactor * tolerance)) return null;
    return { evidence: { trueRelativeResidual: residual, tolerance, factor: residual / tolerance }, lines: [parsed?.lines["trueRelativeResidual"]] };
  },
  "setup-dominates"({ run, parsed, limits }) {
    const { setupSeconds, solveSeconds } = run;
    const repeatedSolves = limits.repeatedSolves ?? 1;
    if (setupSeconds == null || solveSeconds == null) return null;
    const totalSeconds = setupSeconds + repeatedSolves * solveSeconds;
    const share = totalSeconds > 0 ? setupSeconds / totalSeconds : 0;
    if (share < setupShare) return null;
    return { evidence: { setupSeconds, totalSeconds, share, repeatedSolves }, lines: [parsed?.lines["setupSeconds"]] };
  },
  "poor-parallel-efficiency": (input) => efficiency(input),
  "memory-near-limit"({ run, parsed, limits }) {
    const { peakMemoryGiB } = run;
    if (peakMemoryGiB == null || limits.memoryGiB == null || limits.memoryGiB <= 0 || run.outcome === "out-of-memory") return null;
    const share = peakMemoryGiB / limits.memoryGiB;
    if (share < memoryShare) return null;
    return { evidence: { peakMemoryGiB, limitGiB: limits.memoryGiB, share }, lines: [parsed?.lines["peakMemoryGiB"]] };
  },
  "load-imbalance": ({ parsed }) => imbalance(parsed?.performance ?? null),
  "unused-options"({ parsed }) {
    if (parsed == null || parsed.unusedOptions.length === 0) return null;
    const options = parsed.unusedOptions.slice(0, 8).join(", ");
    return { evidence: { count: parsed.unusedOptions.length, options }, lines: [parsed.lines["unusedOptions"]] };
  },
  "zero-pivot"({ parsed }) {
    const said = `${parsed?.reason ?? ""} ${parsed?.reasonText ?? ""}`;
    if (!/zero pivot|ZEROPIVOT|missing diagonal/i.test(said)) return null;
    const evidence: Evidence = parsed?.reason == null ? {} : { reason: parsed.reason };
    return { evidence, lines: [parsed?.lines["reason"]] };
  },
  "null-pivots"({ parsed }) {
    const nullPivots = parsed?.mumps?.nullPivots ?? 0;
    return nullPivots > 0 ? { evidence: { nullPivots } } : null;
  },
  "workspace-too-small"({ parsed }) {
    const stated = parsed?.mumps?.errorCode === -9 || parsed?.mumps?.errorCode === -8;
    const observed = /work space/i.test(parsed?.reasonText ?? "") && !/or of memory/.test(parsed?.reasonText ?? "");
    if (!stated && !observed) return null;
    const entries = parsed?.mumps?.entries ?? null;
    const estimate = parsed?.mumps?.estimatedEntries ?? null;
    const grew = entries !== null && estimate !== null && entries > estimate && estimate > 0;
    const evidence: Evidence = grew ? { growth: entries / estimate } : {};
    return { evidence, lines: [parsed?.lines["reason"]] };
  },
  "out-of-memory"({ run, parsed }) {
    const code = parsed?.mumps?.errorCode;
    if (run.outcome !== "out-of-memory" && code !== -13) return null;
    const evidence: Evidence = run.peakMemoryGiB == null ? {} : { peakMemoryGiB: run.peakMemoryGiB };
    return { evidence, lines: [parsed?.lines["outcome"]] };
  },
};

/** Time of one solve with its set-up, null when either is missing. */
function totalOf(run: DiagnosedRun): number | null {
  return run.setupSeconds == null || run.solveSeconds == null ? null : run.setupSeconds + run.solveSeconds;
}

/** Against the converged run of the same strategy on the fewest cores: efficiency below half is poor. */
function efficiency({ run, parsed, otherRuns }: DiagnosisInput): Seen | null {
  const seconds = totalOf(run);
  const processes = run.cores;
  if (seconds === null || seconds <= 0 || processes == null || run.outcome !== "converged") return null;
  const bases = otherRuns.filter((other) => other.strategy === run.strategy && other.outcome === "converged" && other.cores != null && other.cores < processes && totalOf(other) !== null);
  const [base] = [...bases].sort((a, b) => (a.cores ?? 0) - (b.cores ?? 0) || (totalOf(a) ?? 0) - (totalOf(b) ?? 0));
  const baseSeconds = base === undefined ? null : totalOf(base);
  const baseProcesses = base?.cores;
  if (baseSeconds === null || baseProcesses == null || baseProcesses < 1) return null;
  const speedup = baseSeconds / seconds;
  const reached = speedup / (processes / baseProcesses);
  if (reached >= poorEfficiency) return null;
  return { evidence: { processes, baseProcesses, speedup, efficiency: reached }, lines: [parsed?.lines["processes"]] };
}

/** Flops of the whole program, else the time of the products and triangular solves, largest over smallest process. */
function imbalance(performance: NonNullable<DiagnosisInput["parsed"]>["performance"]): Seen | null {
  if (performance === null) return null;
  if (performance.flopsRatio !== null && performance.flopsRatio >= imbalanceRatio) {
    return { evidence: { ratio: performance.flopsRatio, what: "floating-point work" }, lines: [performance.flopsRatioLine] };
  }
  // Events that synchronise hide the imbalance in the waiting of others; these mostly do not.
  const local = performance.events.filter(({ name, seconds }) => (name === "MatSolve" || name === "MatMult") && seconds > 0);
  const worst = local.reduce<(typeof local)[number] | null>((most, event) => (most === null || event.timeRatio > most.timeRatio ? event : most), null);
  if (worst === null || worst.timeRatio < 2 * imbalanceRatio) return null;
  return { evidence: { ratio: worst.timeRatio, what: `time in ${worst.name}` }, lines: [worst.line] };
}

const order: readonly FindingSeverity[] = ["failure", "risk", "waste", "note"];

function isFindingId(id: string): id is FindingId {
  return Object.hasOwn(findings, id);
}

/**
 * What is conspicuous about a run, gravest first, each with its numbers, the lines that show it, and what to try.
 * Pure: the same run, log, limits and other runs always give the same findings. Where a log has too little, fewer are
 * made; nothing is inferred from absent values.
 */
export function diagnoseRun(input: DiagnosisInput): Finding[] {
  const found: Finding[] = [];
  for (const id of Object.keys(tests).filter(isFindingId)) {
    const seen = tests[id](input);
    if (seen === null) continue;
    const { title, severity, whatToTry, source } = findings[id];
    const text = findings[id].text(seen.evidence);
    const lines = (seen.lines ?? []).filter((line): line is number => line != null);
    found.push({ id, title, severity, text, whatToTry, source, evidence: seen.evidence, lines });
  }
  return found.sort((a, b) => order.indexOf(a.severity) - order.indexOf(b.severity));
}
