"use client";

import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { passwordMinLength, resetPasswordSchema } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { goTo } from "./go-to";
import { useActionForm } from "./use-action-form";

/** Sets a new password by the token of a reset link. */
export function ResetPasswordForm({ token, action }: { token: string; action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const form = useActionForm({
    schema: resetPasswordSchema,
    fixed: { token },
    fields: ["password"],
    action,
    onDone: () => goTo("/sign-in?reset=done"),
  });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Set the password">
      <Field label="New password" help={`At least ${passwordMinLength} characters. You will be signed out everywhere.`} error={form.errorOf("password")} required>
        <Input type="password" autoComplete="new-password" {...form.register("password")} />
      </Field>
    </FormBody>
  );
}
