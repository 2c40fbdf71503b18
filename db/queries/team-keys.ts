import { and, desc, eq, sql } from "drizzle-orm";
import type { AccountDatabase } from "../scope";
import { apikey, member, user } from "../schema/auth";

export type TeamKey = { id: string; name: string; start: string; scope: "read" | "write"; makerName: string; createdAt: Date; lastUsedAt: Date | null };

const keyTeam = sql<string>`${apikey.metadata}::jsonb ->> 'teamId'`;

/** The team's keys that work, the newest first; a key whose maker left the team does not. */
export function listTeamKeys(db: AccountDatabase, teamId: string): Promise<TeamKey[]> {
  return db
    .select({
      id: apikey.id,
      name: sql<string>`coalesce(${apikey.name}, '')`,
      start: sql<string>`coalesce(${apikey.start}, '')`,
      scope: sql<"read" | "write">`case when ${apikey.metadata}::jsonb ->> 'scope' = 'write' then 'write' else 'read' end`,
      makerName: user.name,
      createdAt: apikey.createdAt,
      lastUsedAt: apikey.lastRequest,
    })
    .from(apikey)
    .innerJoin(user, eq(user.id, apikey.referenceId))
    .innerJoin(member, and(eq(member.userId, user.id), eq(member.organizationId, teamId)))
    .where(eq(keyTeam, teamId))
    .orderBy(desc(apikey.createdAt), desc(apikey.id));
}

/** Deletes one key of the team. Returns its name, or undefined when the team has no such key. */
export async function deleteTeamKey(db: AccountDatabase, params: { teamId: string; id: string }): Promise<string | undefined> {
  const rows = await db
    .delete(apikey)
    .where(and(eq(apikey.id, params.id), eq(keyTeam, params.teamId)))
    .returning({ name: apikey.name });
  const row = rows[0];
  return row ? (row.name ?? "") : undefined;
}
