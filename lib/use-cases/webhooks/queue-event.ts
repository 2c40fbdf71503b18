import type { RunRow } from "@/db/queries/runs";
import { insertDelivery, listListeners } from "@/db/queries/webhooks";
import type { TeamDatabase } from "@/db/scope";
import type { WebhookEvent } from "@/lib/api/contract/webhooks";
import { readAuthSettings } from "@/lib/auth/settings";
import { enqueue } from "@/lib/jobs/queue";
import { runView } from "@/lib/use-cases/runs/run-view";

type Event = { teamId: string; event: WebhookEvent; data: Record<string, unknown> };

/** Queues an event for every webhook that listens, in the transaction of the change it tells of: no change, no message. */
export async function queueEvent(db: TeamDatabase, { teamId, event, data }: Event): Promise<void> {
  for (const { id: webhookId } of await listListeners(db, { teamId, event })) {
    const deliveryId = await insertDelivery(db, { teamId, webhookId, event, payload: data });
    await enqueue(db, "deliver-webhook", { teamId, deliveryId });
  }
}

/** Tells of a run just recorded; the run as the API shows it, with its predicted values. */
export async function queueRunRecorded(db: TeamDatabase, teamId: string, row: RunRow): Promise<void> {
  await queueEvent(db, { teamId, event: "run.recorded", data: { run: runView(row), address: `${readAuthSettings().baseUrl}/cases/${row.caseNumber}` } });
}

/** Tells of an edition that became the live one. */
export async function queueEditionPublished(db: TeamDatabase, { teamId, ...edition }: { teamId: string; number: number; origin: string; note: string; rules: number }): Promise<void> {
  await queueEvent(db, { teamId, event: "edition.published", data: { edition, address: `${readAuthSettings().baseUrl}/rulebook` } });
}
