import type { ReactNode } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { DeliveryView, WebhookView } from "@/lib/api/contract/webhooks";
import type { FormResult } from "@/lib/auth/form-answer";
import { formatDateTime } from "@/lib/shared/format-date";
import { ConfirmButton } from "./confirm-button";
import { eventWords } from "./webhook-form";

type WebhookListProps = { webhooks: readonly WebhookView[]; onSwitch: (webhook: WebhookView) => void; remove: (webhook: WebhookView) => Promise<FormResult<void>>; deliveries: (webhook: WebhookView) => ReactNode };

/** The team's webhooks, each unfolding to what was sent to it. */
export function WebhookList({ webhooks, onSwitch, remove, deliveries }: WebhookListProps) {
  return (
    <ul className="grid">
      {webhooks.map((webhook) => (
        <li key={webhook.id} className="grid gap-2 border-b border-hairline py-3 text-sm">
          <div className="flex flex-wrap items-center justify-between gap-3">
            <span className="min-w-0">
              <span className="font-mono break-all">{webhook.url}</span>
              <span className="block text-faint">{webhook.events.map((event) => eventWords[event]).join("; ")}</span>
            </span>
            <span className="flex flex-wrap items-center gap-2">
              {!webhook.enabled && <Badge tone="faint">off</Badge>}
              <Button size="small" variant="quiet" onClick={() => onSwitch(webhook)}>{webhook.enabled ? "Switch off" : "Switch on"}</Button>
              <ConfirmButton
                label="Delete"
                accessibleLabel={`Delete the webhook ${webhook.url}`}
                title="Delete this webhook?"
                text="What still waits is not sent, and the list of its deliveries goes with it."
                act={() => remove(webhook)}
                done="The webhook is deleted."
              />
            </span>
          </div>
          {deliveries(webhook)}
        </li>
      ))}
    </ul>
  );
}

const statusLooks: Record<DeliveryView["status"], { word: string; tone: "water" | "forest" | "bad" }> = {
  waiting: { word: "waiting", tone: "water" },
  delivered: { word: "delivered", tone: "forest" },
  "given-up": { word: "given up", tone: "bad" },
};

/** What was sent to one webhook lately. */
export function DeliveryTable({ deliveries }: { deliveries: readonly DeliveryView[] }) {
  if (deliveries.length === 0) return <p className="text-sm text-faint">Nothing was sent yet.</p>;
  return (
    <Table label="Deliveries">
      <TableHeader>
        <TableRow>
          <TableHead>Event</TableHead>
          <TableHead>State</TableHead>
          <TableHead>Attempts</TableHead>
          <TableHead>Last answer</TableHead>
          <TableHead>Queued</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {deliveries.map((delivery) => (
          <TableRow key={delivery.id}>
            <TableCell>{delivery.event}</TableCell>
            <TableCell><Badge tone={statusLooks[delivery.status].tone}>{statusLooks[delivery.status].word}</Badge></TableCell>
            <TableCell className="figures">{delivery.attempts}</TableCell>
            <TableCell>{delivery.lastAnswer ?? "none yet"}</TableCell>
            <TableCell className="whitespace-nowrap">{formatDateTime(delivery.createdAt)}</TableCell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
