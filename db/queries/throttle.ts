import { eq, lt, sql } from "drizzle-orm";
import type { Database } from "../client";
import { throttle } from "../schema/auth";

/**
 * Counts one attempt under `key` in a fixed window, in one statement, so that parallel attempts can't share a count.
 * Returns the attempts so far, this one included, and the seconds until the window ends.
 */
export async function countAttempt(db: Database, key: string, windowSeconds: number): Promise<{ attempts: number; secondsLeft: number }> {
  const over = sql`${throttle.windowStartedAt} < now() - make_interval(secs => ${windowSeconds})`;
  const [row] = await db
    .insert(throttle)
    .values({ key, attempts: 1, windowStartedAt: sql`now()` })
    .onConflictDoUpdate({
      target: throttle.key,
      set: {
        attempts: sql`case when ${over} then 1 else ${throttle.attempts} + 1 end`,
        windowStartedAt: sql`case when ${over} then now() else ${throttle.windowStartedAt} end`,
      },
    })
    .returning({
      attempts: throttle.attempts,
      secondsLeft: sql<number>`ceil(extract(epoch from ${throttle.windowStartedAt} + make_interval(secs => ${windowSeconds}) - now()))::int`,
    });
  if (!row) throw new Error("The attempt was not counted.");
  return { attempts: row.attempts, secondsLeft: Math.max(1, row.secondsLeft) };
}

/** Forgets the attempts under `key`. */
export async function forgetAttempts(db: Database, key: string): Promise<void> {
  await db.delete(throttle).where(eq(throttle.key, key));
}

/** Takes back one attempt, because it turned out to be none. */
export async function takeBackAttempt(db: Database, key: string): Promise<void> {
  await db.update(throttle).set({ attempts: sql`greatest(${throttle.attempts} - 1, 0)` }).where(eq(throttle.key, key));
}

/** Removes windows that ended long ago. */
export async function pruneAttempts(db: Database): Promise<void> {
  await db.delete(throttle).where(lt(throttle.windowStartedAt, sql`now() - interval '1 day'`));
}
