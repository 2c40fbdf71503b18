import type { RunRow, RunValues } from "@/db/queries/runs";
import type { RunReport } from "@/lib/runs/run";

/** A run report as stored: what it does not say is null, cores fall to the case's, the time of measuring to `now`. */
export function runValues(report: RunReport, caseCores: number, now: Date): RunValues {
  return {
    strategy: report.strategy,
    strategyName: report.strategyName ?? null,
    outcome: report.outcome,
    reason: report.reason ?? null,
    iterations: report.iterations ?? null,
    setupSeconds: report.setupSeconds ?? null,
    solveSeconds: report.solveSeconds ?? null,
    peakMemoryGiB: report.peakMemoryGiB ?? null,
    cores: report.cores ?? caseCores,
    trueRelativeResidual: report.trueRelativeResidual ?? null,
    monitoredRelativeResidual: report.monitoredRelativeResidual ?? null,
    monitoredNorm: report.monitoredNorm ?? null,
    parameters: report.parameters ?? {},
    followedAdvice: report.followedAdvice ?? null,
    note: report.note ?? "",
    measuredAt: report.measuredAt === undefined ? now : new Date(report.measuredAt),
  };
}

/** The other way: a stored run as the report that would record it. Names that hold nothing are left out. */
export function reportOf(row: RunRow): Record<string, unknown> {
  return {
    strategy: row.strategy,
    ...(row.strategyName === null ? {} : { strategyName: row.strategyName }),
    outcome: row.outcome,
    ...(row.reason === null ? {} : { reason: row.reason }),
    iterations: row.iterations,
    setupSeconds: row.setupSeconds,
    solveSeconds: row.solveSeconds,
    peakMemoryGiB: row.peakMemoryGiB,
    cores: row.cores,
    trueRelativeResidual: row.trueRelativeResidual,
    monitoredRelativeResidual: row.monitoredRelativeResidual,
    monitoredNorm: row.monitoredNorm,
    parameters: row.parameters,
    followedAdvice: row.followedAdvice,
    note: row.note,
    measuredAt: row.measuredAt.toISOString(),
  };
}
