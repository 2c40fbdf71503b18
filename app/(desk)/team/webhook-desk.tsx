"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { WebhookForm } from "@/components/team/webhook-form";
import { DeliveryTable, WebhookList } from "@/components/team/webhook-list";
import { CodeBlock } from "@/components/ui/code-block";
import { notify } from "@/components/ui/notify";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { WebhookEvent, WebhookMade, WebhookView } from "@/lib/api/contract/webhooks";
import type { FormResult } from "@/lib/auth/form-answer";
import { ApiProblem, callApi, problemText } from "@/lib/queries/call-api";
import { deliveriesQuery, webhookKeys, webhooksQuery } from "@/lib/queries/webhooks";

/** Addresses that are told of events, for owners. */
export function WebhookDesk() {
  const queryClient = useQueryClient();
  const { data, error } = useQuery(webhooksQuery());
  const [made, setMade] = useState<WebhookMade | null>(null);
  const refresh = () => queryClient.invalidateQueries({ queryKey: webhookKeys.all });
  const add = useMutation({
    mutationFn: (webhook: { url: string; events: WebhookEvent[] }) => callApi<WebhookMade>("/webhooks", { method: "POST", body: webhook }),
    onSuccess: async (webhook) => {
      setMade(webhook);
      await refresh();
    },
  });
  const change = useMutation({
    mutationFn: ({ id, enabled }: WebhookView) => callApi(`/webhooks/${id}`, { method: "PATCH", body: { enabled: !enabled } }),
    onSuccess: refresh,
    onError: (failure) => notify(problemText(failure), "error"),
  });
  async function remove({ id }: WebhookView): Promise<FormResult<void>> {
    try {
      await callApi(`/webhooks/${id}`, { method: "DELETE" });
    } catch (failure) {
      return { ok: false, message: problemText(failure), fields: [] };
    }
    await refresh();
    return { ok: true, value: undefined };
  }
  const refusal = add.error instanceof ApiProblem ? add.error.fields : [];
  return (
    <section className="grid gap-3">
      <h2 className="text-xl font-semibold">Webhooks</h2>
      <p className="max-w-prose text-sm text-faint">
        Messages to a server of yours when a run is recorded or an edition published: JSON, signed with HMAC-SHA256, tried again with growing pauses for about an hour and a half.
      </p>
      {error !== null && <Notice tone="bad">{problemText(error)}</Notice>}
      {data === undefined && error === null && <Skeleton className="h-16" />}
      {data?.length === 0 && <p className="text-sm text-faint">The team has no webhooks.</p>}
      {data !== undefined && data.length > 0 && (
        <WebhookList webhooks={data} onSwitch={(webhook) => change.mutate(webhook)} remove={remove} deliveries={(webhook) => <Deliveries id={webhook.id} />} />
      )}
      {made !== null && (
        <Notice tone="good" announce title="Copy the secret now">
          It is shown this once. The receiver checks the header Saddlemark-Signature with it: hmac-sha256= and the HMAC of Saddlemark-Timestamp, a full stop and the body.
          <CodeBlock title="Secret" code={made.secret} />
        </Notice>
      )}
      {add.error !== null && refusal.length === 0 && <Notice tone="bad" title="The webhook was not added" announce>{problemText(add.error)}</Notice>}
      <WebhookForm key={made?.id ?? "first"} busy={add.isPending} errors={refusal} onSubmit={(webhook) => add.mutate(webhook)} />
    </section>
  );
}

function Deliveries({ id }: { id: string }) {
  const [shown, setShown] = useState(false);
  const { data, error } = useQuery({ ...deliveriesQuery(id), enabled: shown });
  return (
    <details onToggle={(event) => setShown(event.currentTarget.open)}>
      <summary className="cursor-pointer text-sm text-water underline underline-offset-3">Deliveries</summary>
      <div className="pt-2">
        {error !== null && <Notice tone="bad">{problemText(error)}</Notice>}
        {shown && data !== undefined && <DeliveryTable deliveries={data} />}
      </div>
    </details>
  );
}
