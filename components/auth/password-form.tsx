"use client";

import { notify } from "@/components/ui/notify";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { changePasswordSchema, passwordMinLength } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { useActionForm } from "./use-action-form";

export function PasswordForm({ email, action }: { email: string; action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const form = useActionForm({
    schema: changePasswordSchema,
    fields: ["currentPassword", "newPassword"],
    action,
    onDone: () => {
      notify("The password is changed. Other sessions are signed out.", "success");
      form.reset();
    },
  });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Change the password" variant="plain">
      {/* Password managers look for the account's name beside the password. */}
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <Field label="Present password" error={form.errorOf("currentPassword")} required>
        <Input type="password" autoComplete="current-password" {...form.register("currentPassword")} />
      </Field>
      <Field label="New password" help={`At least ${passwordMinLength} characters. Other sessions are signed out.`} error={form.errorOf("newPassword")} required>
        <Input type="password" autoComplete="new-password" {...form.register("newPassword")} />
      </Field>
    </FormBody>
  );
}
