import type { ParsedLog } from "@/lib/logs/parsed-log";
import type { RunReport } from "@/lib/runs/run";
import type { RunFormValues } from "@/lib/runs/run-form";

const text = (value: number | null) => (value === null ? "" : String(value));

/** The run form filled with what a log says. What it does not say is left blank; strategy and outcome, which must be chosen, stay as they were. */
export function formOfLog(parsed: ParsedLog, before: RunFormValues): RunFormValues {
  return {
    ...before,
    strategy: parsed.strategy ?? before.strategy,
    outcome: parsed.outcome ?? before.outcome,
    reason: parsed.outcome === "broken" ? (parsed.reasonText ?? parsed.reason ?? "").slice(0, 400) : "",
    // Cycles around an inner solve are not the strategy's iterations; the sum of the inner ones is not printed.
    iterations: parsed.preconditioner === "ksp" ? "" : text(parsed.iterations),
    setupSeconds: text(parsed.setupSeconds),
    solveSeconds: text(parsed.solveSeconds),
    peakMemoryGiB: text(parsed.peakMemoryGiB),
    cores: text(parsed.processes),
    trueRelativeResidual: text(parsed.trueRelativeResidual),
    monitoredRelativeResidual: text(parsed.monitoredRelativeResidual),
    monitoredNorm: parsed.monitoredNorm ?? "",
  };
}

/** Numbers and choices of the form: left blank they take back what the log says. */
const blankable = ["reason", "iterations", "setupSeconds", "solveSeconds", "peakMemoryGiB", "cores", "trueRelativeResidual", "monitoredRelativeResidual", "monitoredNorm"] as const;

/** A checked report as what stands over the log in the address of the call that records it. */
export function correctionsOf(report: RunReport): URLSearchParams {
  const search = new URLSearchParams({ strategy: report.strategy, outcome: report.outcome });
  if (report.strategyName !== undefined) search.set("strategyName", report.strategyName);
  if (report.note !== undefined) search.set("note", report.note);
  for (const name of blankable) search.set(name, String(report[name] ?? ""));
  return search;
}
