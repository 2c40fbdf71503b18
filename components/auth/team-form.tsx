"use client";

import { z } from "zod";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { teamNameField } from "@/lib/auth/account-schemas";
import type { FormResult } from "@/lib/auth/form-answer";
import { FormBody } from "./form-body";
import { goTo } from "./go-to";
import { useActionForm } from "./use-action-form";

const schema = z.object({ teamName: teamNameField });

/** Makes another team for somebody who is signed in. */
export function TeamForm({ action }: { action: (data: FormData) => Promise<FormResult<undefined>> }) {
  const form = useActionForm({ schema, fields: ["teamName"], action, onDone: () => goTo("/cases") });
  return (
    <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Make the team">
      <Field label="Team" help="You will own it and can invite others." error={form.errorOf("teamName")} required>
        <Input autoComplete="organization" {...form.register("teamName")} />
      </Field>
    </FormBody>
  );
}
