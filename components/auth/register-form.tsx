"use client";

import { z } from "zod";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { emailField, nameField, newPasswordField, passwordMinLength, teamNameField } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { goTo } from "./go-to";
import { useActionForm } from "./use-action-form";

type Action = (data: FormData) => Promise<FormResult<undefined>>;

const ownTeamSchema = z.object({ name: nameField, email: emailField, password: newPasswordField, teamName: teamNameField });
const invitedSchema = z.object({ name: nameField, email: emailField, password: newPasswordField, invitationId: z.string() });

/** Registers somebody with a team of their own. */
export function RegisterForm({ action }: { action: Action }) {
  const form = useActionForm({
    schema: ownTeamSchema,
    fields: ["name", "email", "password", "teamName"],
    action,
    onDone: () => goTo("/cases"),
  });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Register">
      <Field label="Your name" error={form.errorOf("name")} required>
        <Input autoComplete="name" {...form.register("name")} />
      </Field>
      <Field label="E-mail" error={form.errorOf("email")} required>
        <Input type="email" autoComplete="username" inputMode="email" {...form.register("email")} />
      </Field>
      <Field label="Password" help={`At least ${passwordMinLength} characters.`} error={form.errorOf("password")} required>
        <Input type="password" autoComplete="new-password" {...form.register("password")} />
      </Field>
      <Field label="Team" help="Cases, runs and rules belong to a team. You will own this one and can invite others." error={form.errorOf("teamName")} required>
        <Input autoComplete="organization" {...form.register("teamName")} />
      </Field>
    </FormBody>
  );
}

/** Registers somebody who was invited: the address is the invitation's and can't be changed. */
export function InvitedRegisterForm({ email, invitationId, action }: { email: string; invitationId: string; action: Action }) {
  const form = useActionForm({
    schema: invitedSchema,
    fixed: { invitationId },
    fields: ["name", "email", "password"],
    action,
    onDone: () => goTo("/cases"),
  });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Register and join">
      <Field label="Your name" error={form.errorOf("name")} required>
        <Input autoComplete="name" {...form.register("name")} />
      </Field>
      <Field label="E-mail" help="The invitation is for this address." error={form.errorOf("email")} required>
        <Input type="email" autoComplete="username" readOnly defaultValue={email} {...form.register("email")} />
      </Field>
      <Field label="Password" help={`At least ${passwordMinLength} characters.`} error={form.errorOf("password")} required>
        <Input type="password" autoComplete="new-password" {...form.register("password")} />
      </Field>
    </FormBody>
  );
}
