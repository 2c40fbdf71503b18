"use client";

import { useState } from "react";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { forgotPasswordSchema } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { useActionForm } from "./use-action-form";

/** Asks for the letter with a reset link. The answer is the same whether the address has an account or not. */
export function ForgotPasswordForm({ action }: { action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const [asked, setAsked] = useState(false);
  const form = useActionForm({ schema: forgotPasswordSchema, fields: ["email"], action, onDone: () => setAsked(true) });
  if (asked) {
    return (
      <Notice tone="good" announce title="Look into your mail">
        If this address has an account, a letter with a link is on its way. The link works for an hour.
      </Notice>
    );
  }
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Send the link">
      <Field label="E-mail" error={form.errorOf("email")} required>
        <Input type="email" autoComplete="username" inputMode="email" {...form.register("email")} />
      </Field>
    </FormBody>
  );
}
