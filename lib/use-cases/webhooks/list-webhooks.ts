import { z } from "zod";
import { findWebhook, listDeliveries as listDeliveryRows, listWebhooks as listWebhookRows } from "@/db/queries/webhooks";
import { withTeam } from "@/db/scope";
import type { DeliveryView, WebhookView } from "@/lib/api/contract/webhooks";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { deliveryView, webhookNotFound, webhookView } from "./webhook-view";

const page = { limit: z.int().min(1).max(200), cursor: z.string().optional() };
const placeSchema = z.tuple([z.iso.datetime({ precision: 6 }), z.uuid()]);
type Paged<Item> = { items: Item[]; nextCursor: string | null };

/** Addresses told of events, the oldest first, without their secrets. */
export const listWebhooks = defineUseCase({
  permission: "team:manage",
  input: z.strictObject(page),
  run: ({ scope }, { limit, cursor }): Promise<Paged<WebhookView>> =>
    withTeam(scope, async (db) => {
      const rows = await listWebhookRows(db, scope, { after: placeOf(cursor, "webhooks"), limit: limit + 1 });
      return { items: rows.slice(0, limit).map(webhookView), nextCursor: nextOf(rows, limit, "webhooks") };
    }),
});

/** What was sent to one webhook and what it answered, the newest first. */
export const listDeliveries = defineUseCase({
  permission: "team:manage",
  input: z.strictObject({ id: z.uuid(), ...page }),
  run: ({ scope }, { id, limit, cursor }): Promise<Paged<DeliveryView>> =>
    withTeam(scope, async (db) => {
      if ((await findWebhook(db, scope, id)) === null) throw webhookNotFound();
      const rows = await listDeliveryRows(db, scope, { webhookId: id, after: placeOf(cursor, "deliveries"), limit: limit + 1 });
      return { items: rows.slice(0, limit).map(deliveryView), nextCursor: nextOf(rows, limit, "deliveries") };
    }),
});

function placeOf(cursor: string | undefined, sort: string): { createdKey: string; id: string } | null {
  const place = decodeCursor(cursor, sort, placeSchema);
  return place === null ? null : { createdKey: place[0], id: place[1] };
}

function nextOf(rows: readonly { createdKey: string; id: string }[], limit: number, sort: string): string | null {
  const last = rows[limit - 1];
  return rows.length > limit && last ? encodeCursor(sort, [last.createdKey, last.id]) : null;
}
