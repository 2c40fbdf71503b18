"use client";

import { useEffect } from "react";
import { useForm, useWatch, type FieldErrors, type Resolver } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { Textarea } from "@/components/ui/textarea";
import { monitoredNorms, outcomes, runReportSchema, type Outcome, type RunReport } from "@/lib/runs/run";
import { fromRunForm, runFormSchema, type RunFormValues } from "@/lib/runs/run-form";
import type { FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";

type RunFormProps = {
  initial: RunFormValues;
  /** A correction asks why and sends blanks as "not known". */
  correcting: boolean;
  submitting: boolean;
  refusal: { message: string; fields: readonly FieldError[] } | null;
  onSubmit: (report: RunReport, explanation: string) => void;
  onCancel: () => void;
};

const outcomeWords: Record<Outcome, string> = {
  converged: "Converged",
  stalled: "Stalled: iteration limit, residual flat",
  diverged: "Diverged",
  "out-of-memory": "Out of memory",
  "over-time": "Over the time limit",
  broken: "Broken: did not start, refused, or wrong answer",
};

const numberFields = [
  { name: "iterations", label: "Iterations", unit: undefined, help: "Of the outer Krylov method; none for a factorisation." },
  { name: "setupSeconds", label: "Set-up time", unit: "s", help: "Wall seconds of one set-up, assembly left out." },
  { name: "solveSeconds", label: "Time of one solve", unit: "s", help: "Wall seconds of one solve." },
  { name: "peakMemoryGiB", label: "Peak memory", unit: "GiB", help: "Summed over the processes." },
  { name: "cores", label: "Cores", unit: undefined, help: "As run; other counts than the case's stay out of the hit rates." },
  { name: "trueRelativeResidual", label: "True relative residual", unit: undefined, help: "|b - Kx| / |b|, if you have it: it verifies the run." },
] as const;

/** A run report by hand. Only the strategy and the outcome must be given. */
export function RunForm({ initial, correcting, submitting, refusal, onSubmit, onCancel }: RunFormProps) {
  const form = useForm<RunFormValues>({ defaultValues: initial, resolver: runResolver(correcting), mode: "onTouched" });
  const { register, control, setError, formState } = form;
  const [strategy, outcome] = useWatch({ control, name: ["strategy", "outcome"] });
  const error = (name: keyof RunFormValues) => formState.errors[name]?.message;

  useEffect(() => {
    for (const field of refusal?.fields ?? []) {
      const name = runFormSchema.keyof().safeParse(field.path);
      if (name.success) setError(name.data, { type: "server", message: field.message }, { shouldFocus: true });
    }
  }, [refusal, setError]);

  const submit = form.handleSubmit((values) => {
    const report = runReportSchema.safeParse(fromRunForm(values, correcting ? "null" : "omit"));
    if (report.success) onSubmit(report.data, values.explanation);
  });

  return (
    <form noValidate onSubmit={(event) => void submit(event)} aria-label={correcting ? "Correct the run" : "Report a run"} className="grid gap-5">
      <div className="grid items-start gap-x-6 gap-y-4 sm:grid-cols-2">
        <Field label="Strategy" error={error("strategy")}>
          <Select {...register("strategy")}>
            {strategyIds.map((id) => (
              <option key={id} value={id}>{strategyNames[id]}</option>
            ))}
            <option value="other">Another strategy</option>
          </Select>
        </Field>
        {strategy === "other" && (
          <Field label="Its name" help="Recorded and shown, never advised." error={error("strategyName")} required>
            <Input {...register("strategyName")} />
          </Field>
        )}
        <Field label="Outcome" error={error("outcome")}>
          <Select {...register("outcome")}>
            {outcomes.map((one) => (
              <option key={one} value={one}>{outcomeWords[one]}</option>
            ))}
          </Select>
        </Field>
        {outcome === "broken" && (
          <Field label="What happened" error={error("reason")}>
            <Input {...register("reason")} />
          </Field>
        )}
        {numberFields.map((field) => (
          <Field key={field.name} label={field.label} help={field.help} error={error(field.name)}>
            <Input inputMode="decimal" autoComplete="off" {...(field.unit === undefined ? {} : { unit: field.unit })} {...register(field.name)} />
          </Field>
        ))}
        <Field label="Residual the solver monitored" help="Relative, at the last iteration." error={error("monitoredRelativeResidual")}>
          <Input inputMode="decimal" autoComplete="off" {...register("monitoredRelativeResidual")} />
        </Field>
        <Field label="In which norm" help="What its own test looked at." error={error("monitoredNorm")}>
          <Select {...register("monitoredNorm")}>
            <option value="">Not known</option>
            {monitoredNorms.map((norm) => (
              <option key={norm} value={norm}>{norm}</option>
            ))}
          </Select>
        </Field>
      </div>
      <Field label="Note" error={error("note")}>
        <Textarea rows={2} {...register("note")} />
      </Field>
      {correcting && (
        <Field label="Why it is corrected" help="Kept with the former values." error={error("explanation")}>
          <Input {...register("explanation")} />
        </Field>
      )}
      {refusal !== null && (
        <Notice tone="bad" title="The run was not saved" announce>
          {refusal.message}
        </Notice>
      )}
      <div className="flex flex-wrap gap-2">
        <Button type="submit" variant="main" disabled={submitting}>{submitting ? "Saving" : correcting ? "Save the correction" : "Record the run"}</Button>
        <Button variant="quiet" onClick={onCancel}>Cancel</Button>
      </div>
    </form>
  );
}

function runResolver(correcting: boolean): Resolver<RunFormValues> {
  return (values) => {
    const parsed = runReportSchema.safeParse(fromRunForm(values, correcting ? "null" : "omit"));
    if (parsed.success) return { values, errors: {} };
    const errors: FieldErrors<RunFormValues> = {};
    for (const problem of fieldErrorsOf(parsed.error)) {
      const name = runFormSchema.keyof().safeParse(problem.path);
      if (name.success) errors[name.data] ??= { type: "refused", message: problem.message };
    }
    return { values: {}, errors };
  };
}
