import { and, arrayContains, asc, desc, eq, or, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import { user } from "../schema/auth";
import { webhook, webhookDelivery } from "../schema/intake";
import type { TeamDatabase } from "../scope";

function selectWebhooks(db: TeamDatabase) {
  return db
    .select({
      id: webhook.id,
      url: webhook.url,
      events: webhook.events,
      enabled: webhook.enabled,
      createdBy: webhook.createdBy,
      creatorName: user.name,
      createdAt: webhook.createdAt,
      createdKey: sql<string>`to_char(${webhook.createdAt} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
    })
    .from(webhook)
    .leftJoin(user, eq(user.id, webhook.createdBy));
}
export type WebhookRow = Awaited<ReturnType<typeof listWebhooks>>[number];

type Place = { createdKey: string; id: string };

/** The oldest first; equal times by id. The secret is not among the columns. */
export async function listWebhooks(db: TeamDatabase, scope: Scope, params: { after: Place | null; limit: number }) {
  const { after } = params;
  const beyond = after === null ? undefined : sql`(${webhook.createdAt}, ${webhook.id}) > (${after.createdKey}::timestamptz, ${after.id}::uuid)`;
  return selectWebhooks(db).where(and(eq(webhook.teamId, scope.teamId), beyond)).orderBy(asc(webhook.createdAt), asc(webhook.id)).limit(params.limit);
}

export async function findWebhook(db: TeamDatabase, scope: Scope, id: string): Promise<WebhookRow | null> {
  const rows = await selectWebhooks(db).where(and(eq(webhook.teamId, scope.teamId), eq(webhook.id, id)));
  return rows[0] ?? null;
}

export async function countWebhooks(db: TeamDatabase, scope: Scope): Promise<number> {
  return db.$count(webhook, eq(webhook.teamId, scope.teamId));
}

export async function insertWebhook(db: TeamDatabase, scope: Scope, params: { url: string; secret: string; events: string[] }): Promise<string> {
  const [row] = await db
    .insert(webhook)
    .values({ ...params, teamId: scope.teamId, createdBy: scope.userId })
    .returning({ id: webhook.id });
  if (!row) throw new Error("The webhook was not stored.");
  return row.id;
}

export async function updateWebhook(db: TeamDatabase, scope: Scope, params: { id: string; changes: Partial<{ url: string; events: string[]; enabled: boolean }> }): Promise<void> {
  await db
    .update(webhook)
    .set(params.changes)
    .where(and(eq(webhook.teamId, scope.teamId), eq(webhook.id, params.id)));
}

/** Its deliveries go with it. */
export async function deleteWebhook(db: TeamDatabase, scope: Scope, id: string): Promise<void> {
  await db.delete(webhook).where(and(eq(webhook.teamId, scope.teamId), eq(webhook.id, id)));
}

/** Webhooks that want to hear of an event now. For jobs and events, which act for a team and not for a person. */
export async function listListeners(db: TeamDatabase, params: { teamId: string; event: string }): Promise<{ id: string }[]> {
  return db
    .select({ id: webhook.id })
    .from(webhook)
    .where(and(eq(webhook.teamId, params.teamId), eq(webhook.enabled, true), arrayContains(webhook.events, [params.event])));
}

export async function insertDelivery(db: TeamDatabase, params: { teamId: string; webhookId: string; event: string; payload: unknown }): Promise<string> {
  const [row] = await db.insert(webhookDelivery).values(params).returning({ id: webhookDelivery.id });
  if (!row) throw new Error("The delivery was not stored.");
  return row.id;
}

export type DeliveryJob = NonNullable<Awaited<ReturnType<typeof findDelivery>>>;

/** A delivery with where it goes and what signs it; null when the webhook was deleted. */
export async function findDelivery(db: TeamDatabase, params: { teamId: string; id: string }) {
  const rows = await db
    .select({
      id: webhookDelivery.id,
      event: webhookDelivery.event,
      payload: webhookDelivery.payload,
      status: webhookDelivery.status,
      attempts: webhookDelivery.attempts,
      createdAt: webhookDelivery.createdAt,
      url: webhook.url,
      secret: webhook.secret,
      enabled: webhook.enabled,
    })
    .from(webhookDelivery)
    .innerJoin(webhook, and(eq(webhook.id, webhookDelivery.webhookId), eq(webhook.teamId, webhookDelivery.teamId)))
    .where(and(eq(webhookDelivery.teamId, params.teamId), eq(webhookDelivery.id, params.id)));
  return rows[0] ?? null;
}

type Outcome = { teamId: string; id: string; status: "waiting" | "delivered" | "given-up"; lastAnswer: string };

/** Counts an attempt and keeps what came of it. */
export async function recordAttempt(db: TeamDatabase, { teamId, id, status, lastAnswer }: Outcome): Promise<void> {
  await db
    .update(webhookDelivery)
    .set({ status, lastAnswer, attempts: sql`${webhookDelivery.attempts} + 1`, deliveredAt: status === "delivered" ? sql`now()` : null })
    .where(and(eq(webhookDelivery.teamId, teamId), eq(webhookDelivery.id, id)));
}

/** Deliveries of one webhook, the newest first; equal times by id. */
export async function listDeliveries(db: TeamDatabase, scope: Scope, params: { webhookId: string; after: Place | null; limit: number }) {
  const { after } = params;
  const beyond =
    after === null
      ? undefined
      : or(
          sql`${webhookDelivery.createdAt} < ${after.createdKey}::timestamptz`,
          and(sql`${webhookDelivery.createdAt} = ${after.createdKey}::timestamptz`, sql`${webhookDelivery.id} > ${after.id}::uuid`),
        );
  return db
    .select({
      id: webhookDelivery.id,
      event: webhookDelivery.event,
      status: webhookDelivery.status,
      attempts: webhookDelivery.attempts,
      lastAnswer: webhookDelivery.lastAnswer,
      createdAt: webhookDelivery.createdAt,
      deliveredAt: webhookDelivery.deliveredAt,
      createdKey: sql<string>`to_char(${webhookDelivery.createdAt} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
    })
    .from(webhookDelivery)
    .where(and(eq(webhookDelivery.teamId, scope.teamId), eq(webhookDelivery.webhookId, params.webhookId), beyond))
    .orderBy(desc(webhookDelivery.createdAt), asc(webhookDelivery.id))
    .limit(params.limit);
}
export type DeliveryRow = Awaited<ReturnType<typeof listDeliveries>>[number];
