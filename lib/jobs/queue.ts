import { sql, type SQL } from "drizzle-orm";
import PgBoss from "pg-boss";
import { jobDefinitions, jobSchemaName, type JobName, type JobPayload } from "./definitions";

/** Anything that runs statements: a transaction of either role. */
type Executor = { execute: (query: SQL) => Promise<{ rows: unknown[] }> };

let sender: PgBoss | undefined;

/**
 * Adds a job as a part of the caller's transaction: it exists if and only if the transaction commits.
 * Returns the job's id. Throws when the payload does not fit its schema or the queue is not installed.
 */
export async function enqueue<Name extends JobName>(db: Executor, name: Name, payload: JobPayload<Name>): Promise<string> {
  const data = jobDefinitions[name].payload.parse(payload);
  const executeSql = async (text: string, values: unknown[]) => db.execute(withValues(text, values));
  const id = await jobSender().send(name, data, { db: { executeSql } });
  if (id === null) throw new Error(`The queue ${name} is not installed.`);
  return id;
}

/** pg-boss only composes the statement here; it is never started and opens no connection. */
function jobSender(): PgBoss {
  return (sender ??= new PgBoss({ schema: jobSchemaName, db: { executeSql: refuse }, migrate: false, supervise: false, schedule: false }));
}

function refuse(): Promise<never> {
  return Promise.reject(new Error("A job is sent inside a transaction."));
}

/** A statement with $1, $2, ... as drizzle's SQL, so that it runs on the transaction's own connection. */
function withValues(text: string, values: readonly unknown[]): SQL {
  const parts = text.split(/\$(\d+)/);
  // Odd parts are the numbers of the placeholders.
  return sql.join(parts.map((part, index) => (index % 2 === 0 ? sql.raw(part) : sql`${bound(values[Number(part) - 1])}`)));
}

function bound(value: unknown): unknown {
  if (value === undefined) return null;
  return typeof value === "object" && value !== null ? JSON.stringify(value) : value;
}
