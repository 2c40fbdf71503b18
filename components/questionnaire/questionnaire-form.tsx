"use client";

import { useEffect, useMemo, useRef, type ReactNode } from "react";
import { FormProvider, useForm, type FieldErrors, type FieldPath, type Resolver } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { formValuesSchema, type FormValues } from "@/lib/questionnaire/form-values";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { questions } from "@/lib/questionnaire/questions";
import type { FieldError } from "@/lib/shared/app-error";
import { checkForm, type SavedMachine } from "./check-form";
import { MachineQuestions } from "./machine-questions";
import { MeshQuestions } from "./mesh-questions";
import { MoreQuestions } from "./more-questions";
import { ProblemQuestions } from "./problem-questions";
import { ProgramQuestions } from "./program-questions";

type QuestionnaireFormProps = {
  initial: FormValues;
  machines: readonly SavedMachine[];
  onChange: (values: FormValues) => void;
  onSubmit: (questionnaire: Questionnaire) => void;
  submitting: boolean;
  /** What the server refused, by the questionnaire's paths; the sentence without a field stands above the button. */
  refusal: { message: string; fields: readonly FieldError[] } | null;
  saveSheet: (values: FormValues) => ReactNode;
};

const paths: readonly string[] = Object.keys(questions);

/** A group's path, such as "imported", is shown at its first field. */
const firstFieldOf: Record<string, FieldPath<FormValues>> = { imported: "imported.cells", size: "size.value", hardware: "hardware.cores", contrast: "contrast.ratio" };

function fieldFor(path: string): FieldPath<FormValues> | null {
  if (paths.includes(path)) return path as FieldPath<FormValues>;
  return firstFieldOf[path] ?? null;
}

function nest(errors: readonly FieldError[]): FieldErrors<FormValues> {
  const nested: Record<string, unknown> = {};
  for (const error of errors) {
    const [head = "", tail] = (fieldFor(error.path) ?? "title").split(".");
    const leaf = { type: "refused", message: error.message };
    if (tail === undefined) nested[head] ??= leaf;
    else nested[head] = { [tail]: leaf, ...(nested[head] as object | undefined) };
  }
  return nested as FieldErrors<FormValues>;
}

/** The whole questionnaire on one page. Reports every change; submits only answers that can be used. */
export function QuestionnaireForm({ initial, machines, onChange, onSubmit, submitting, refusal, saveSheet }: QuestionnaireFormProps) {
  const resolver = useMemo<Resolver<FormValues>>(
    () => (values) => {
      const { errors } = checkForm(values, machines);
      return errors.length === 0 ? { values, errors: {} } : { values: {}, errors: nest(errors) };
    },
    [machines],
  );
  const form = useForm<FormValues>({ defaultValues: initial, resolver, mode: "onChange", shouldFocusError: true });
  const { subscribe, setError } = form;
  const notify = useRef(onChange);

  useEffect(() => {
    notify.current = onChange;
  });
  useEffect(() => {
    return subscribe({
      formState: { values: true },
      callback: ({ values }) => {
        const whole = formValuesSchema.safeParse(values);
        if (whole.success) notify.current(whole.data);
      },
    });
  }, [subscribe]);
  useEffect(() => {
    for (const field of refusal?.fields ?? []) {
      const name = fieldFor(field.path.replace(/^questionnaire\./, ""));
      if (name) setError(name, { type: "server", message: field.message }, { shouldFocus: true });
    }
  }, [refusal, setError]);

  const submit = form.handleSubmit((values) => {
    const { questionnaire } = checkForm(values, machines);
    if (questionnaire) onSubmit(questionnaire);
  });

  return (
    <FormProvider {...form}>
      <form noValidate onSubmit={(event) => void submit(event)} className="grid gap-8" aria-label="Questionnaire">
        <Group title="Problem">
          <ProblemQuestions />
        </Group>
        <Group title="Mesh and element">
          <MeshQuestions />
        </Group>
        <Group title="Machine">
          <MachineQuestions machines={machines} saveSheet={saveSheet(form.getValues())} />
        </Group>
        <Group title="Program">
          <ProgramQuestions />
        </Group>
        <MoreQuestions />
        <div className="grid gap-3 border-t border-hairline pt-5">
          {refusal !== null && (
            <Notice tone="bad" title="The case was not saved" announce>
              {refusal.message}
            </Notice>
          )}
          <div>
            <Button type="submit" variant="main" size="large" disabled={submitting}>
              {submitting ? "Working out the advice" : "Save the case and get advice"}
            </Button>
          </div>
        </div>
      </form>
    </FormProvider>
  );
}

function Group({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="grid gap-4">
      <h2 className="border-b border-contour pb-1 text-lg font-semibold">{title}</h2>
      <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">{children}</div>
    </section>
  );
}
