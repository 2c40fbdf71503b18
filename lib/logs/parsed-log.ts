import { z } from "zod";
import { monitoredNorms, outcomes } from "@/lib/runs/run";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";

export const problemSeverities = ["error", "warning", "note"] as const;

/** What is wrong or doubtful in the log; `line` is 1-based, null when no single line is to blame. */
export const logProblemSchema = z.object({
  line: z.int().min(1).nullable(),
  text: z.string(),
  severity: z.enum(problemSeverities),
});
export type LogProblem = z.infer<typeof logProblemSchema>;

const finite = z.number();
const count = z.int().min(0);

const tolerancesSchema = z.object({
  relative: finite.nullable(),
  absolute: finite.nullable(),
  divergence: finite.nullable(),
  maximumIterations: count.nullable(),
});

/** What MUMPS reports of its factorisation; memory in millions of bytes, as MUMPS counts it. */
const mumpsSchema = z.object({
  version: z.string().nullable(),
  errorCode: z.int().nullable(),
  errorDetail: z.int().nullable(),
  estimatedEntries: finite.nullable(),
  entries: finite.nullable(),
  compressedEntries: finite.nullable(),
  factorFlops: finite.nullable(),
  memoryMegabytesSum: finite.nullable(),
  memoryMegabytesMax: finite.nullable(),
  delayedPivots: finite.nullable(),
  nullPivots: finite.nullable(),
});

export const loggedEventSchema = z.object({
  name: z.string(),
  calls: count,
  /** Wall seconds, largest over the processes. */
  seconds: finite,
  /** Largest over smallest time of the processes; 0 where the smallest is 0. */
  timeRatio: finite,
  line: z.int().min(1),
});

/** The performance summary (`-log_view`); ratios are largest over smallest of the processes. */
const performanceSchema = z.object({
  totalSeconds: finite.nullable(),
  timeRatio: finite.nullable(),
  flopsRatio: finite.nullable(),
  flopsRatioLine: z.int().min(1).nullable(),
  events: z.array(loggedEventSchema),
});

/** Norms as printed; `trueRelative` is the true one over the norm of the right-hand side, where the log prints it. */
const residualPointSchema = z.object({
  iteration: count,
  monitored: finite,
  true: finite.nullable(),
  trueRelative: finite.nullable(),
});
export type ResidualPoint = z.infer<typeof residualPointSchema>;

/**
 * What a log says. The first block has the shape published by the API; null means "the log does not say" or "it says
 * two things". Times are wall seconds for one set-up and one solve, memory is summed over the processes.
 */
export const parsedLogSchema = z.object({
  strategy: strategyIdSchema.nullable(),
  krylovMethod: z.string().nullable(),
  outcome: z.enum(outcomes).nullable(),
  reason: z.string().nullable(),
  iterations: count.nullable(),
  processes: z.int().min(1).nullable(),
  setupSeconds: finite.nullable(),
  solveSeconds: finite.nullable(),
  peakMemoryGiB: finite.nullable(),
  trueRelativeResidual: finite.nullable(),
  monitoredRelativeResidual: finite.nullable(),
  monitoredNorm: z.enum(monitoredNorms).nullable(),
  factorEntries: finite.nullable(),
  unusedOptions: z.array(z.string()),
  residualHistory: z.array(residualPointSchema),
  lines: z.record(z.string(), z.int().min(1)),

  /** Sentence behind `reason`, for the screen: what failed and where. */
  reasonText: z.string().nullable(),
  preconditioner: z.string().nullable(),
  factorisation: z.enum(["lu", "cholesky"]).nullable(),
  factorPackage: z.string().nullable(),
  systemUnknowns: count.nullable(),
  restart: count.nullable(),
  tolerances: tolerancesSchema.nullable(),
  mumps: mumpsSchema.nullable(),
  performance: performanceSchema.nullable(),
  /** Complete solves of the outermost solver; null when the log leaves it open. */
  solves: count.nullable(),
  /** Only every n-th residual was kept when the history was longer than the limit. */
  historyStride: z.int().min(1),
  libraryVersion: z.string().nullable(),
  options: z.array(z.object({ name: z.string(), value: z.string().nullable() })),
  linesRead: count,
  problems: z.array(logProblemSchema),
});
export type ParsedLog = z.infer<typeof parsedLogSchema>;
export type LoggedEvent = z.infer<typeof loggedEventSchema>;
export type MumpsStatistics = z.infer<typeof mumpsSchema>;
export type PerformanceSummary = z.infer<typeof performanceSchema>;

/** A log that says nothing. */
export function emptyParsedLog(): ParsedLog {
  return {
    strategy: null,
    krylovMethod: null,
    outcome: null,
    reason: null,
    iterations: null,
    processes: null,
    setupSeconds: null,
    solveSeconds: null,
    peakMemoryGiB: null,
    trueRelativeResidual: null,
    monitoredRelativeResidual: null,
    monitoredNorm: null,
    factorEntries: null,
    unusedOptions: [],
    residualHistory: [],
    lines: {},
    reasonText: null,
    preconditioner: null,
    factorisation: null,
    factorPackage: null,
    systemUnknowns: null,
    restart: null,
    tolerances: null,
    mumps: null,
    performance: null,
    solves: null,
    historyStride: 1,
    libraryVersion: null,
    options: [],
    linesRead: 0,
    problems: [],
  };
}
