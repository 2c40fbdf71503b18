"use client";

import { notify } from "@/components/ui/notify";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { changeNameSchema } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { useActionForm } from "./use-action-form";

export function NameForm({ name, action }: { name: string; action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const form = useActionForm({ schema: changeNameSchema, fields: ["name"], action, onDone: () => notify("The name is changed.", "success") });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Change the name" variant="plain">
      <Field label="Your name" error={form.errorOf("name")} required>
        <Input autoComplete="name" defaultValue={name} {...form.register("name")} />
      </Field>
    </FormBody>
  );
}
