import { z } from "zod";
import { readNumber } from "@/lib/questionnaire/form-values";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { monitoredNorms, outcomes } from "./run";

/** State of the run report's form: numbers as typed. "" in a choice means not said. */
export const runFormSchema = z.object({
  strategy: z.enum([...strategyIds, "other"]),
  strategyName: z.string(),
  outcome: z.enum(outcomes),
  reason: z.string(),
  iterations: z.string(),
  setupSeconds: z.string(),
  solveSeconds: z.string(),
  peakMemoryGiB: z.string(),
  cores: z.string(),
  trueRelativeResidual: z.string(),
  monitoredRelativeResidual: z.string(),
  monitoredNorm: z.enum([...monitoredNorms, ""]),
  note: z.string(),
  explanation: z.string(),
});
export type RunFormValues = z.infer<typeof runFormSchema>;

export const emptyRunForm: RunFormValues = {
  strategy: "direct-ldlt",
  strategyName: "",
  outcome: "converged",
  reason: "",
  iterations: "",
  setupSeconds: "",
  solveSeconds: "",
  peakMemoryGiB: "",
  cores: "",
  trueRelativeResidual: "",
  monitoredRelativeResidual: "",
  monitoredNorm: "",
  note: "",
  explanation: "",
};

/** The form as the run report's schema expects it; not yet checked. Empty fields are left out, or null when `blanks` is "null". */
export function fromRunForm(values: RunFormValues, blanks: "omit" | "null" = "omit"): Record<string, unknown> {
  const numbers = {
    iterations: readNumber(values.iterations),
    setupSeconds: readNumber(values.setupSeconds),
    solveSeconds: readNumber(values.solveSeconds),
    peakMemoryGiB: readNumber(values.peakMemoryGiB),
    cores: readNumber(values.cores),
    trueRelativeResidual: readNumber(values.trueRelativeResidual),
    monitoredRelativeResidual: readNumber(values.monitoredRelativeResidual),
    monitoredNorm: values.monitoredNorm === "" ? undefined : values.monitoredNorm,
  };
  const answered: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(numbers)) {
    if (value !== undefined) answered[name] = value;
    else if (blanks === "null") answered[name] = null;
  }
  return {
    strategy: values.strategy,
    ...(values.strategy === "other" ? { strategyName: values.strategyName } : {}),
    outcome: values.outcome,
    ...(values.outcome === "broken" && values.reason.trim() !== "" ? { reason: values.reason } : {}),
    ...answered,
    ...(values.note.trim() === "" ? {} : { note: values.note }),
  };
}
