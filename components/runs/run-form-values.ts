import type { RunView } from "@/lib/api/contract/runs";
import { emptyRunForm, type RunFormValues } from "@/lib/runs/run-form";

const text = (value: number | null) => (value === null ? "" : String(value));

/** A recorded run as the form shows it, to be corrected. */
export function runFormOf(run: RunView): RunFormValues {
  return {
    ...emptyRunForm,
    strategy: run.strategy,
    strategyName: run.strategyName ?? "",
    outcome: run.outcome,
    reason: run.reason ?? "",
    iterations: text(run.iterations),
    setupSeconds: text(run.setupSeconds),
    solveSeconds: text(run.solveSeconds),
    peakMemoryGiB: text(run.peakMemoryGiB),
    cores: text(run.cores),
    trueRelativeResidual: text(run.trueRelativeResidual),
    monitoredRelativeResidual: text(run.monitoredRelativeResidual),
    monitoredNorm: run.monitoredNorm ?? "",
    note: run.note,
  };
}
