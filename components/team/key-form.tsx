"use client";

import { useState } from "react";
import { FormBody } from "@/components/auth/form-body";
import { useActionForm } from "@/components/auth/use-action-form";
import { CodeBlock } from "@/components/ui/code-block";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import type { FormResult } from "@/lib/auth/form-answer";
import { createKeySchema } from "@/lib/auth/team-schemas";

/** Makes a key and shows it this once. */
export function KeyForm({ action }: { action: (data: FormData) => Promise<FormResult<{ id: string; key: string }>> }) {
  const [made, setMade] = useState<string | null>(null);
  const form = useActionForm({
    schema: createKeySchema,
    fields: ["name", "scope"],
    action,
    onDone: ({ key }) => {
      setMade(key);
      form.reset();
    },
  });
  return (
    <div className="grid max-w-xl gap-4 pt-2">
      {made !== null && (
        <Notice tone="good" announce title="Copy the key now">
          It is shown this once: only a hash of it is kept.
          <CodeBlock title="API key" code={made} />
        </Notice>
      )}
      <FormBody send={form.send} problem={form.problem} busy={form.formState.isSubmitting} submit="Make a key" variant="plain">
        <div className="grid gap-4 sm:grid-cols-[1fr_10rem]">
          <Field label="Name of the key" help="Such as the batch job that will use it." error={form.errorOf("name")} required>
            <Input autoComplete="off" {...form.register("name")} />
          </Field>
          <Field label="May" error={form.errorOf("scope")} required>
            <Select defaultValue="read" {...form.register("scope")}>
              <option value="read">read</option>
              <option value="write">read and write</option>
            </Select>
          </Field>
        </div>
      </FormBody>
    </div>
  );
}
