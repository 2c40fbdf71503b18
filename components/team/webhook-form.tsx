"use client";

import { useState, type FormEvent } from "react";
import { Button } from "@/components/ui/button";
import { CheckboxLine } from "@/components/ui/checkbox";
import { Field, FieldSet } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { webhookEvents, type WebhookEvent } from "@/lib/api/contract/webhooks";
import type { FieldError } from "@/lib/shared/app-error";

type WebhookFormProps = { busy: boolean; errors: readonly FieldError[]; onSubmit: (webhook: { url: string; events: WebhookEvent[] }) => void };

export const eventWords: Record<WebhookEvent, string> = { "run.recorded": "A run is recorded", "edition.published": "An edition is published" };

/** A new address and the events it is told of. */
export function WebhookForm({ busy, errors, onSubmit }: WebhookFormProps) {
  const [url, setUrl] = useState("");
  const [events, setEvents] = useState<readonly WebhookEvent[]>(["run.recorded"]);
  const errorOf = (name: string) => errors.find(({ path }) => path.split(".")[0] === name)?.message;

  function submit(event: FormEvent): void {
    event.preventDefault();
    onSubmit({ url, events: [...events] });
  }

  return (
    <form noValidate onSubmit={submit} aria-label="New webhook" className="grid max-w-xl gap-4 pt-2">
      <Field label="Address" help="Such as https://hooks.example.org/solver-runs." error={errorOf("url")} required>
        <Input type="url" autoComplete="off" value={url} onChange={(event) => setUrl(event.target.value)} />
      </Field>
      <FieldSet legend="Told when" error={errorOf("events")}>
        {webhookEvents.map((one) => (
          <CheckboxLine
            key={one}
            label={eventWords[one]}
            checked={events.includes(one)}
            onCheckedChange={(checked) => setEvents(webhookEvents.filter((other) => (other === one ? checked === true : events.includes(other))))}
          />
        ))}
      </FieldSet>
      <div>
        <Button type="submit" disabled={busy}>{busy ? "Saving" : "Add the webhook"}</Button>
      </div>
    </form>
  );
}
