"use client";

import type { ReactNode } from "react";
import { useFormContext, useFormState, type FieldPath } from "react-hook-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { FormValues } from "@/lib/questionnaire/form-values";
import { questions, type QuestionName } from "@/lib/questionnaire/questions";

type Name = QuestionName & FieldPath<FormValues>;

/** The sentence under a field that was refused. */
export function useQuestionError(name: FieldPath<FormValues>): string | undefined {
  const { control, getFieldState } = useFormContext<FormValues>();
  const state = useFormState({ control, name });
  return getFieldState(name, state).error?.message;
}

/** A question with its label, help line and error around the control given as children. */
export function QuestionField({ name, hint, children }: { name: Name; hint?: ReactNode; children: ReactNode }) {
  const { label, help } = questions[name];
  return (
    <Field label={label} help={help} error={useQuestionError(name)} hint={hint}>
      {children}
    </Field>
  );
}

export function NumberQuestion({ name, disabled = false }: { name: Name; disabled?: boolean }) {
  const { register } = useFormContext<FormValues>();
  const { unit } = questions[name];
  return (
    <QuestionField name={name}>
      <Input inputMode="decimal" autoComplete="off" spellCheck={false} readOnly={disabled} {...(unit === "" ? {} : { unit })} {...register(name)} />
    </QuestionField>
  );
}

export function TextQuestion({ name }: { name: Name }) {
  const { register } = useFormContext<FormValues>();
  return (
    <QuestionField name={name}>
      <Input autoComplete="off" {...register(name)} />
    </QuestionField>
  );
}

type Choice = { value: string; label: string; disabled?: boolean };

export function ChoiceQuestion({ name, choices, hint }: { name: Name; choices: readonly Choice[]; hint?: ReactNode }) {
  const { register } = useFormContext<FormValues>();
  return (
    <QuestionField name={name} hint={hint}>
      <Select {...register(name)}>
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value} disabled={choice.disabled ?? false}>
            {choice.label}
          </option>
        ))}
      </Select>
    </QuestionField>
  );
}
