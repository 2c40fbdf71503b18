import { and, asc, desc, eq, gt, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import type { Role } from "@/lib/auth/permissions";
import type { AccountDatabase, TeamDatabase } from "../scope";
import { invitation, organization, user, type invitationStatuses } from "../schema/auth";

export type PendingInvitation = { id: string; email: string; role: Role; inviterName: string; createdAt: Date; expiresAt: Date };

/** Invitations of the scope's team that can still be accepted, the newest first. */
export function listPendingInvitations(db: TeamDatabase, scope: Scope, params: { now: Date }): Promise<PendingInvitation[]> {
  return db
    .select({
      id: invitation.id,
      email: invitation.email,
      role: invitation.role,
      // Whoever left the team can't be seen any more.
      inviterName: sql<string>`coalesce(${user.name}, 'a former member')`,
      createdAt: invitation.createdAt,
      expiresAt: invitation.expiresAt,
    })
    .from(invitation)
    .leftJoin(user, eq(user.id, invitation.inviterId))
    .where(and(eq(invitation.organizationId, scope.teamId), eq(invitation.status, "pending"), gt(invitation.expiresAt, params.now)))
    .orderBy(desc(invitation.createdAt), asc(invitation.id));
}

export type InvitationDetail = {
  id: string;
  teamId: string;
  teamName: string;
  email: string;
  role: Role;
  status: (typeof invitationStatuses)[number];
  expiresAt: Date;
  inviterName: string;
};

/** One invitation by the secret in its link, whatever its state; locked when `lock`, for accepting it once only. */
export async function findInvitation(db: Pick<AccountDatabase, "select">, id: string, lock = false): Promise<InvitationDetail | undefined> {
  const query = db
    .select({
      id: invitation.id,
      teamId: invitation.organizationId,
      teamName: organization.name,
      email: invitation.email,
      role: invitation.role,
      status: invitation.status,
      expiresAt: invitation.expiresAt,
      inviterName: user.name,
    })
    .from(invitation)
    .innerJoin(organization, eq(organization.id, invitation.organizationId))
    .innerJoin(user, eq(user.id, invitation.inviterId))
    .where(eq(invitation.id, id));
  const rows = await (lock ? query.for("update", { of: invitation }) : query);
  return rows[0];
}

type NewInvitation = { id: string; teamId: string; email: string; role: Role; inviterId: string; expiresAt: Date };

/** Adds an invitation; earlier open ones for the same address stop working. */
export async function insertInvitation(db: AccountDatabase, { teamId, ...row }: NewInvitation): Promise<void> {
  await db
    .update(invitation)
    .set({ status: "canceled" })
    .where(and(eq(invitation.organizationId, teamId), eq(invitation.email, row.email), eq(invitation.status, "pending")));
  await db.insert(invitation).values({ ...row, organizationId: teamId, status: "pending" });
}

/** Ends a pending invitation of the team. Returns its address, or undefined when there is no such one. */
export async function cancelInvitation(db: AccountDatabase, params: { teamId: string; id: string }): Promise<string | undefined> {
  const rows = await db
    .update(invitation)
    .set({ status: "canceled" })
    .where(and(eq(invitation.organizationId, params.teamId), eq(invitation.id, params.id), eq(invitation.status, "pending")))
    .returning({ email: invitation.email });
  return rows[0]?.email;
}

export async function markInvitationAccepted(db: AccountDatabase, id: string): Promise<void> {
  await db.update(invitation).set({ status: "accepted" }).where(eq(invitation.id, id));
}

/** True when somebody has an account under this address. */
export async function accountExists(db: Pick<AccountDatabase, "select">, email: string): Promise<boolean> {
  const rows = await db.select({ id: user.id }).from(user).where(eq(user.email, email)).limit(1);
  return rows.length > 0;
}
