"use client";

import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { signInSchema } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { goTo } from "./go-to";
import { useActionForm } from "./use-action-form";

type Props = { next: string; email?: string; action: (data: FormData) => Promise<FormResult<undefined>> };

export function SignInForm({ next, email = "", action }: Props) {
  const form = useActionForm({
    schema: signInSchema,
    fields: ["email", "password"],
    action,
    onDone: () => goTo(next),
  });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Sign in">
      <Field label="E-mail" error={form.errorOf("email")} required>
        <Input type="email" autoComplete="username" inputMode="email" defaultValue={email} {...form.register("email")} />
      </Field>
      <Field label="Password" error={form.errorOf("password")} required>
        <Input type="password" autoComplete="current-password" {...form.register("password")} />
      </Field>
    </FormBody>
  );
}
