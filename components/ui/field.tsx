"use client";

import { createContext, useContext, useId, type ReactNode } from "react";
import { cn } from "./cn";
import { Label } from "./label";

type FieldControl = { id: string; describedBy: string | undefined; invalid: boolean; required: boolean };

const FieldContext = createContext<FieldControl | null>(null);

type FieldProps = {
  label: ReactNode;
  help?: ReactNode;
  /** What is wrong and what to do; the control is then marked invalid and points here. */
  error?: string | undefined;
  required?: boolean;
  /** Stands behind the label, such as a unit. */
  hint?: ReactNode;
  className?: string;
  children: ReactNode;
};

/** One labelled control with its help text and error, linked to each other. The control inside takes its id and descriptions from here. */
export function Field({ label, help, error, required = false, hint, className, children }: FieldProps) {
  const id = useId();
  const describedBy = describe(id, help, error);
  return (
    <FieldContext value={{ id, describedBy, invalid: error !== undefined, required }}>
      <div className={cn("grid content-start gap-1.5", className)}>
        <span className="flex items-baseline justify-between gap-3">
          <Label htmlFor={id}>{label}</Label>
          {hint !== undefined && <span className="text-xs text-faint">{hint}</span>}
        </span>
        {children}
        <FieldTexts id={id} help={help} error={error} />
      </div>
    </FieldContext>
  );
}

type FieldSetProps = { legend: ReactNode; help?: ReactNode; error?: string | undefined; className?: string; children: ReactNode };

/** Several controls that answer one question: a fieldset with a legend, help and a linked error. */
export function FieldSet({ legend, help, error, className, children }: FieldSetProps) {
  const id = useId();
  return (
    <fieldset className={cn("grid min-w-0 content-start gap-1.5", className)} aria-describedby={describe(id, help, error)} aria-invalid={error !== undefined || undefined}>
      <legend className="mb-1.5 text-sm font-semibold">{legend}</legend>
      {children}
      <FieldTexts id={id} help={help} error={error} />
    </fieldset>
  );
}

/** The attributes that link a control to its field; a control outside a field keeps its own. */
export function useFieldControl(own: { id?: string | undefined; "aria-describedby"?: string | undefined; "aria-invalid"?: unknown; required?: boolean | undefined }) {
  const field = useContext(FieldContext);
  const invalid = own["aria-invalid"] === true || own["aria-invalid"] === "true" || field?.invalid === true;
  return {
    id: own.id ?? field?.id,
    "aria-describedby": [own["aria-describedby"], field?.describedBy].filter(Boolean).join(" ") || undefined,
    "aria-invalid": invalid || undefined,
    // Announced, not enforced by the browser: its own bubble would hide our sentence.
    "aria-required": own.required === true || field?.required === true || undefined,
  };
}

function FieldTexts({ id, help, error }: { id: string; help?: ReactNode; error?: string | undefined }) {
  return (
    <>
      {help !== undefined && (
        <p id={`${id}-help`} className="text-sm text-faint">
          {help}
        </p>
      )}
      <p id={`${id}-error`} aria-live="polite" className={cn("text-sm font-medium text-bad", error === undefined && "hidden")}>
        {error}
      </p>
    </>
  );
}

function describe(id: string, help: ReactNode, error: string | undefined): string | undefined {
  const ids = [help === undefined ? null : `${id}-help`, error === undefined ? null : `${id}-error`].filter((part) => part !== null);
  return ids.length === 0 ? undefined : ids.join(" ");
}
