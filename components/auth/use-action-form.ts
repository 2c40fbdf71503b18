"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState, type BaseSyntheticEvent } from "react";
import { useForm, type DefaultValues, type FieldValues, type Path, type UseFormReturn } from "react-hook-form";
import type { z } from "zod";
import type { FormResult } from "@/lib/auth/form-answer";

type Options<Values extends FieldValues, Value> = {
  schema: z.ZodType<Values, Values>;
  /**
   * Values that have no control. Controls say their own `defaultValue`: then the server writes it too, and what somebody types
   * before the script has loaded is kept.
   */
  fixed?: DefaultValues<Values>;
  /** The fields that are shown; a refusal of any other is told for the form as a whole. */
  fields: readonly Path<Values>[];
  action: (data: FormData) => Promise<FormResult<Value>>;
  onDone: (value: Value) => void;
};

export type ActionForm<Values extends FieldValues> = UseFormReturn<Values, unknown, Values> & {
  /** What went wrong with the form as a whole, or null. */
  problem: string | null;
  send: (event?: BaseSyntheticEvent) => Promise<void>;
  errorOf: (field: Path<Values>) => string | undefined;
};

/** A form checked here by the same schema as on the server; the server's refusals land at their fields. */
export function useActionForm<Values extends FieldValues, Value>({ schema, fixed, fields, action, onDone }: Options<Values, Value>): ActionForm<Values> {
  const form = useForm<Values, unknown, Values>({ resolver: zodResolver(schema), ...(fixed === undefined ? {} : { defaultValues: fixed }) });
  const [problem, setProblem] = useState<string | null>(null);

  const send = form.handleSubmit(async (values) => {
    setProblem(null);
    const result = await action(formDataOf(values)).catch(() => unreachable);
    if (result.ok) return onDone(result.value);
    const refused = fields.filter((field) => result.fields.some(({ path }) => path === field));
    refused.forEach((field, index) => {
      form.setError(field, { message: result.fields.find(({ path }) => path === field)?.message ?? result.message }, { shouldFocus: index === 0 });
    });
    if (refused.length === 0) setProblem(result.message);
  });

  const errorOf = (field: Path<Values>) => form.getFieldState(field, form.formState).error?.message;
  return { ...form, problem, send, errorOf };
}

const unreachable = { ok: false as const, message: "The server can't be reached. Check the connection, then try again.", fields: [] };

function formDataOf(values: FieldValues): FormData {
  const data = new FormData();
  for (const [name, value] of Object.entries(values)) if (typeof value === "string") data.set(name, value);
  return data;
}
