import type { Outcome } from "@/lib/runs/run";

/** What of a run the diagnosis looks at; null or absent is "not recorded". Times in wall seconds, memory in GiB. */
export type DiagnosedRun = {
  outcome: Outcome | null;
  strategy: string | null;
  iterations?: number | null;
  setupSeconds?: number | null;
  solveSeconds?: number | null;
  peakMemoryGiB?: number | null;
  cores?: number | null;
  trueRelativeResidual?: number | null;
};

/** What of a parsed log the diagnosis looks at, by structure; line numbers are 1-based. */
export type DiagnosedLog = {
  reason: string | null;
  reasonText: string | null;
  restart: number | null;
  monitoredNorm: string | null;
  unusedOptions: readonly string[];
  residualHistory: readonly { iteration: number; monitored: number; true: number | null }[];
  historyStride: number;
  lines: Readonly<Record<string, number>>;
  mumps: { errorCode: number | null; estimatedEntries: number | null; entries: number | null; nullPivots: number | null } | null;
  performance: {
    flopsRatio: number | null;
    flopsRatioLine: number | null;
    events: readonly { name: string; seconds: number; timeRatio: number; line: number }[];
  } | null;
};

/** What the case allows and asks for. */
export type DiagnosisLimits = {
  tolerance?: number | null;
  memoryGiB?: number | null;
  repeatedSolves?: number | null;
};

export type DiagnosisInput = {
  run: DiagnosedRun;
  parsed?: DiagnosedLog | null;
  limits: DiagnosisLimits;
  /** Other runs of the same case. */
  otherRuns: readonly DiagnosedRun[];
};
