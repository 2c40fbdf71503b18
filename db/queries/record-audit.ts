import type { TeamDatabase } from "../scope";
import { audit } from "../schema/rulebook";

export type AuditEntry = {
  teamId: string;
  /** Null when the product itself acted. */
  actorId: string | null;
  /** What happened, as "<subject>.<verb in the past>", such as "member.removed". */
  action: string;
  subjectKind: string;
  subjectId: string;
  detail?: Record<string, unknown>;
};

/** Adds an audit row inside the transaction of the change it tells of. */
export async function recordAudit(db: TeamDatabase, entry: AuditEntry): Promise<void> {
  await db.insert(audit).values({ ...entry, detail: entry.detail ?? {} });
}
