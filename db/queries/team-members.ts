import { and, asc, eq, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import type { Role } from "@/lib/auth/permissions";
import type { AccountDatabase, TeamDatabase } from "../scope";
import { apikey, member, organization, user } from "../schema/auth";

export type TeamMember = { userId: string; name: string; email: string; role: Role; joinedAt: Date };

/** The members of the scope's team, by name. */
export function listMembers(db: TeamDatabase, scope: Scope): Promise<TeamMember[]> {
  return db
    .select({ userId: user.id, name: user.name, email: user.email, role: member.role, joinedAt: member.createdAt })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(eq(member.organizationId, scope.teamId))
    .orderBy(asc(user.name), asc(user.id));
}

/** Locks the team's owners until the transaction ends, so that two owners can't step down past each other. Returns their ids. */
export async function lockOwners(db: AccountDatabase, teamId: string): Promise<string[]> {
  const rows = await db
    .select({ userId: member.userId })
    .from(member)
    .where(and(eq(member.organizationId, teamId), eq(member.role, "owner")))
    .orderBy(asc(member.id))
    .for("update");
  return rows.map(({ userId }) => userId);
}

export async function findMemberRole(db: AccountDatabase, params: { teamId: string; userId: string }): Promise<Role | undefined> {
  const rows = await db.select({ role: member.role }).from(member).where(ofMember(params)).for("update");
  return rows[0]?.role;
}

export async function findMemberByEmail(db: AccountDatabase, params: { teamId: string; email: string }): Promise<{ userId: string } | undefined> {
  const rows = await db
    .select({ userId: user.id })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.organizationId, params.teamId), eq(user.email, params.email)));
  return rows[0];
}

/** Returns false when the person is a member already. */
export async function addMember(db: AccountDatabase, params: { id: string; teamId: string; userId: string; role: Role }): Promise<boolean> {
  const { teamId, ...row } = params;
  const added = await db.insert(member).values({ ...row, organizationId: teamId }).onConflictDoNothing().returning({ id: member.id });
  return added.length === 1;
}

export async function updateMemberRole(db: AccountDatabase, params: { teamId: string; userId: string; role: Role }): Promise<void> {
  await db.update(member).set({ role: params.role }).where(ofMember(params));
}

/** Takes the person out of the team, with the keys they made for it: joining again must not revive them. */
export async function deleteMember(db: AccountDatabase, params: { teamId: string; userId: string }): Promise<void> {
  await db.delete(member).where(ofMember(params));
  await db.delete(apikey).where(and(eq(apikey.referenceId, params.userId), eq(sql`${apikey.metadata}::jsonb ->> 'teamId'`, params.teamId)));
}

export async function insertTeam(db: AccountDatabase, params: { id: string; name: string; slug: string; demonstration: boolean }): Promise<void> {
  const { demonstration, ...row } = params;
  await db.insert(organization).values({ ...row, metadata: demonstration ? JSON.stringify({ demonstration }) : null });
}

/** True when there is any team at all. */
export async function anyTeamExists(db: Pick<AccountDatabase, "select">): Promise<boolean> {
  const rows = await db.select({ id: organization.id }).from(organization).limit(1);
  return rows.length > 0;
}

function ofMember({ teamId, userId }: { teamId: string; userId: string }) {
  return and(eq(member.organizationId, teamId), eq(member.userId, userId));
}
