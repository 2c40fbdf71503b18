import type { ParsedLog } from "@/lib/logs/parsed-log";
import { formatCount, formatGib, formatNumber, formatSeconds } from "@/lib/shared/format";
import { strategyNames } from "@/lib/strategies/strategy-names";

export type UnderstoodValue = { field: string; label: string; /** Null: the log does not say. */ value: string | null; line: number | null };

const fields: readonly { field: keyof ParsedLog & string; label: string; show: (parsed: ParsedLog) => string | null }[] = [
  { field: "strategy", label: "Strategy", show: ({ strategy }) => (strategy === null ? null : strategyNames[strategy]) },
  { field: "krylovMethod", label: "Krylov method", show: ({ krylovMethod }) => krylovMethod },
  { field: "outcome", label: "Outcome", show: ({ outcome, reason }) => (outcome === null ? null : reason === null ? outcome : `${outcome} (${reason})`) },
  { field: "iterations", label: "Iterations", show: ({ iterations }) => given(iterations, formatCount) },
  { field: "processes", label: "Processes", show: ({ processes }) => given(processes, formatCount) },
  { field: "setupSeconds", label: "Set-up time", show: ({ setupSeconds }) => given(setupSeconds, formatSeconds) },
  { field: "solveSeconds", label: "Time of one solve", show: ({ solveSeconds }) => given(solveSeconds, formatSeconds) },
  { field: "peakMemoryGiB", label: "Peak memory", show: ({ peakMemoryGiB }) => given(peakMemoryGiB, formatGib) },
  { field: "trueRelativeResidual", label: "True relative residual", show: ({ trueRelativeResidual }) => given(trueRelativeResidual, formatNumber) },
  { field: "monitoredRelativeResidual", label: "Monitored residual", show: ({ monitoredRelativeResidual }) => given(monitoredRelativeResidual, formatNumber) },
  { field: "monitoredNorm", label: "Its norm", show: ({ monitoredNorm }) => monitoredNorm },
  { field: "tolerances", label: "Relative tolerance", show: ({ tolerances }) => given(tolerances?.relative ?? null, formatNumber) },
  { field: "factorEntries", label: "Factor entries", show: ({ factorEntries }) => given(factorEntries, formatCount) },
  { field: "unusedOptions", label: "Unused options", show: ({ unusedOptions }) => (unusedOptions.length === 0 ? null : unusedOptions.slice(0, 8).join(", ")) },
];

function given(value: number | null, show: (value: number) => string): string | null {
  return value === null ? null : show(value);
}

/** What was understood of a log, in the order in which people ask for it, each with the line it came from. */
export function understoodValues(parsed: ParsedLog): UnderstoodValue[] {
  return fields.map(({ field, label, show }) => {
    const value = show(parsed);
    return { field, label, value, line: value === null ? null : (parsed.lines[field] ?? null) };
  });
}

/** Residuals over the first of their kind, as the chart draws them; nothing where the first can't be divided by. */
export function relativeHistory(parsed: ParsedLog): { iteration: number; monitored: number; true: number | null }[] {
  const first = parsed.residualHistory[0];
  if (first === undefined || !(first.monitored > 0)) return [];
  const start = first.true;
  return parsed.residualHistory.map((point) => ({
    iteration: point.iteration,
    monitored: point.monitored / first.monitored,
    true: point.trueRelative ?? (point.true !== null && start !== null && start > 0 ? point.true / start : null),
  }));
}
