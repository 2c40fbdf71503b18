import { and, eq, exists } from "drizzle-orm";
import type { Database } from "../client";
import { member, session } from "../schema/auth";

/** Points a session at a team. Returns false, and changes nothing, when the person is not in it. */
export async function setActiveTeam(db: Database, params: { sessionToken: string; userId: string; teamId: string }): Promise<boolean> {
  const membership = db
    .select({ id: member.id })
    .from(member)
    .where(and(eq(member.userId, params.userId), eq(member.organizationId, params.teamId)));
  const rows = await db
    .update(session)
    .set({ activeOrganizationId: params.teamId })
    .where(and(eq(session.token, params.sessionToken), eq(session.userId, params.userId), exists(membership)))
    .returning({ id: session.id });
  return rows.length === 1;
}
