"use client";

import { notify } from "@/components/ui/notify";
import { FormBody } from "@/components/auth/form-body";
import { useActionForm } from "@/components/auth/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { FormResult } from "@/lib/auth/form-answer";
import { roles } from "@/lib/auth/permissions";
import { inviteSchema } from "@/lib/auth/team-schemas";

/** Invites an address into the team by mail. */
export function InviteForm({ action }: { action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const form = useActionForm({
    schema: inviteSchema,
    fields: ["email", "role"],
    action,
    onDone: () => {
      notify("The invitation is on its way.", "success");
      form.reset();
    },
  });
  return (
    <div className="max-w-xl pt-2">
      <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Invite" variant="plain">
        <div className="grid gap-4 sm:grid-cols-[1fr_10rem]">
          <Field label="E-mail of the person to invite" error={form.errorOf("email")} required>
            <Input type="email" inputMode="email" autoComplete="off" {...form.register("email")} />
          </Field>
          <Field label="Role" error={form.errorOf("role")} required>
            <Select defaultValue="analyst" {...form.register("role")}>
              {roles.map((role) => (
                <option key={role}>{role}</option>
              ))}
            </Select>
          </Field>
        </div>
      </FormBody>
    </div>
  );
}
