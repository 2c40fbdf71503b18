import { createHash } from "node:crypto";
import type { z } from "zod";
import { claimKey, findAnswer, storeAnswer } from "@/db/queries/idempotency";
import type { TeamDatabase } from "@/db/scope";
import type { Scope } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";

export type Repeatable<T> = { replayed: boolean; response: T };

type Request<Schema extends z.ZodType> = {
  /** Null: nothing is remembered. */
  key: string | null;
  /** What is asked for, and of what; with the body it makes two requests the same. */
  operation: string;
  body: unknown;
  response: Schema;
};

/**
 * Does the work once for an Idempotency-Key, in the caller's transaction: the same key and body again get the first answer, however many
 * ask at the same time. Throws AppError "conflict" when the key was used for another request.
 */
export async function withIdempotency<Schema extends z.ZodType>(
  db: TeamDatabase,
  scope: Scope,
  request: Request<Schema>,
  work: () => Promise<z.output<Schema>>,
): Promise<Repeatable<z.output<Schema>>> {
  const { key } = request;
  if (key === null) return { replayed: false, response: await work() };
  const bodyHash = createHash("sha256").update(`${request.operation}\n${canonicalJson(request.body)}`).digest("hex");
  if (!(await claimKey(db, scope, { key, bodyHash }))) return replay(db, scope, request.response, key, bodyHash);
  const response = await work();
  await storeAnswer(db, scope, { key, response });
  return { replayed: false, response };
}

async function replay<Schema extends z.ZodType>(db: TeamDatabase, scope: Scope, schema: Schema, key: string, bodyHash: string) {
  const answer = await findAnswer(db, scope, key);
  if (answer === null) throw new Error("An idempotency key was claimed and is gone.");
  if (answer.bodyHash !== bodyHash) throw new AppError("conflict", "This Idempotency-Key was used for another request; take a new one.");
  return { replayed: true, response: schema.parse(answer.response) };
}

/** JSON with its names sorted, so that the order in which a client writes fields does not matter. */
function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, item: unknown) =>
    typeof item === "object" && item !== null && !Array.isArray(item) ? Object.fromEntries(Object.entries(item).sort(([a], [b]) => (a < b ? -1 : 1))) : item,
  );
}
