import { and, asc, eq, sql } from "drizzle-orm";
import type { Role } from "@/lib/auth/permissions";
import type { Database } from "../client";
import { member, organization, user } from "../schema/auth";

export type Membership = { teamId: string; teamName: string; role: Role; demonstration: boolean };
export type KeyHolder = Membership & { userId: string; userName: string; userEmail: string };

const columns = {
  teamId: organization.id,
  teamName: organization.name,
  role: member.role,
  demonstration: sql<boolean>`coalesce((${organization.metadata}::jsonb ->> 'demonstration')::boolean, false)`,
};

/** The teams of a person, the one joined first in front; ties by id, so that the default team does not jump. */
export function listMemberships(db: Database, userId: string): Promise<Membership[]> {
  return db
    .select(columns)
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, userId))
    .orderBy(asc(member.createdAt), asc(organization.id));
}

/** A person as a member of one team; undefined when they are not one (any more). */
export async function findKeyHolder(db: Database, params: { userId: string; teamId: string }): Promise<KeyHolder | undefined> {
  const rows = await db
    .select({ ...columns, userId: user.id, userName: user.name, userEmail: user.email })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.userId, params.userId), eq(member.organizationId, params.teamId)));
  return rows[0];
}
