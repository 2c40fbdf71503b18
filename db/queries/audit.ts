import { and, desc, eq, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import { user } from "../schema/auth";
import { audit } from "../schema/rulebook";
import type { TeamDatabase } from "../scope";

/** The newest first; equal instants by id. `after` is the last row of the page before, its instant to the microsecond. */
export async function listAudit(db: TeamDatabase, scope: Scope, params: { after: { atKey: string; id: string } | null; limit: number }) {
  const { after } = params;
  const beyond = after === null ? undefined : sql`(${audit.at}, ${audit.id}) < (${after.atKey}::timestamptz, ${after.id}::uuid)`;
  return db
    .select({
      id: audit.id,
      at: audit.at,
      atKey: sql<string>`to_char(${audit.at} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
      actorId: audit.actorId,
      actorName: user.name,
      action: audit.action,
      subjectKind: audit.subjectKind,
      subjectId: audit.subjectId,
      detail: audit.detail,
    })
    .from(audit)
    .leftJoin(user, eq(user.id, audit.actorId))
    .where(and(eq(audit.teamId, scope.teamId), beyond))
    .orderBy(desc(audit.at), desc(audit.id))
    .limit(params.limit);
}
export type AuditRow = Awaited<ReturnType<typeof listAudit>>[number];
