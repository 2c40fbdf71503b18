import { and, eq } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import { idempotencyKey } from "../schema/runs";
import type { TeamDatabase } from "../scope";

/**
 * Claims a key for this transaction. True: it is new, and `storeAnswer` must follow. False: it was answered before; a call with the same key
 * that is still under way is waited for, because the database lets no second row in until the first is decided.
 */
export async function claimKey(db: TeamDatabase, scope: Scope, params: { key: string; bodyHash: string }): Promise<boolean> {
  const rows = await db
    .insert(idempotencyKey)
    .values({ teamId: scope.teamId, key: params.key, bodyHash: params.bodyHash })
    .onConflictDoNothing()
    .returning({ key: idempotencyKey.key });
  return rows.length === 1;
}

export async function findAnswer(db: TeamDatabase, scope: Scope, key: string): Promise<{ bodyHash: string; response: unknown } | null> {
  const rows = await db
    .select({ bodyHash: idempotencyKey.bodyHash, response: idempotencyKey.response })
    .from(idempotencyKey)
    .where(and(eq(idempotencyKey.teamId, scope.teamId), eq(idempotencyKey.key, key)));
  return rows[0] ?? null;
}

export async function storeAnswer(db: TeamDatabase, scope: Scope, params: { key: string; response: unknown }): Promise<void> {
  await db
    .update(idempotencyKey)
    .set({ response: params.response })
    .where(and(eq(idempotencyKey.teamId, scope.teamId), eq(idempotencyKey.key, params.key)));
}
