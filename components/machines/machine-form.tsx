"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useEffect } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { machineSchema, type Machine } from "@/lib/questionnaire/machine";
import type { FieldError } from "@/lib/shared/app-error";

type MachineFormProps = {
  initial: Machine;
  submitLabel: string;
  submitting: boolean;
  refusal: { message: string; error: unknown } | null;
  onSubmit: (machine: Machine) => void;
  onCancel: () => void;
};

type NumberName = Exclude<keyof Machine, "name">;

const fields: readonly { name: NumberName; label: string; unit: string; help: string }[] = [
  { name: "nodes", label: "Nodes", unit: "", help: "That one job may use." },
  { name: "coresPerNode", label: "Cores per node", unit: "", help: "Physical cores; hardware threads add little to sparse solvers." },
  { name: "memoryPerNodeGiB", label: "Memory per node", unit: "GiB", help: "What a job may use, not what is built in." },
  { name: "bandwidthPerNodeGBps", label: "Memory bandwidth per node", unit: "GB/s", help: "Sustained with all cores busy, as a triad benchmark measures it." },
  { name: "gflopsPerCore", label: "Dense rate per core", unit: "Gflop/s", help: "Sustained by a matrix product in double precision." },
  { name: "networkLatencyMicroseconds", label: "Network latency", unit: "µs", help: "Of one small message between nodes." },
  { name: "networkBandwidthGBps", label: "Network bandwidth", unit: "GB/s", help: "Of a node's link." },
];

/** A machine sheet: what the estimates need to know of a computer. */
export function MachineForm({ initial, submitLabel, submitting, refusal, onSubmit, onCancel }: MachineFormProps) {
  const { register, handleSubmit, setError, formState } = useForm<Machine>({ defaultValues: initial, resolver: zodResolver(machineSchema), mode: "onTouched" });
  useEffect(() => {
    for (const field of fieldsOf(refusal?.error)) {
      const name = machineSchema.keyof().safeParse(field.path);
      if (name.success) setError(name.data, { type: "server", message: field.message }, { shouldFocus: true });
    }
  }, [refusal, setError]);
  return (
    <form
      noValidate
      aria-label="Machine sheet"
      className="grid gap-4"
      onSubmit={(event) => {
        // The dialog stands inside the questionnaire in React's tree: its submit must not reach the form around it.
        event.stopPropagation();
        void handleSubmit(onSubmit)(event);
      }}
    >
      <Field label="Name" error={formState.errors.name?.message} required>
        <Input {...register("name")} autoComplete="off" />
      </Field>
      <div className="grid items-start gap-x-5 gap-y-4 sm:grid-cols-2">
        {fields.map((field) => (
          <Field key={field.name} label={field.label} help={field.help} error={formState.errors[field.name]?.message}>
            <Input inputMode="decimal" autoComplete="off" {...(field.unit === "" ? {} : { unit: field.unit })} {...register(field.name, { setValueAs: readNumberOf })} />
          </Field>
        ))}
      </div>
      {refusal !== null && (
        <Notice tone="bad" title="The sheet was not saved" announce>
          {refusal.message}
        </Notice>
      )}
      <div className="flex flex-wrap gap-2">
        <Button type="submit" variant="main" disabled={submitting}>{submitting ? "Saving" : submitLabel}</Button>
        <Button variant="quiet" onClick={onCancel}>Cancel</Button>
      </div>
    </form>
  );
}

function readNumberOf(value: unknown): number | undefined {
  if (typeof value === "number") return value;
  const compact = typeof value === "string" ? value.replace(/[\s\u00a0\u2009\u202f]/g, "") : "";
  return compact === "" ? undefined : Number(compact);
}

function fieldsOf(error: unknown): readonly FieldError[] {
  return typeof error === "object" && error !== null && "fields" in error && Array.isArray(error.fields) ? error.fields : [];
}
