import { recordAudit } from "@/db/queries/record-audit";
import { deleteMember, findMemberRole, lockOwners } from "@/db/queries/team-members";
import { withTeamAccounts } from "@/db/scope";
import { AppError } from "@/lib/shared/app-error";

/** Ends a membership, unless it is the only owner's. What the person recorded stays with the team. */
export async function takeOutMember({ teamId, actorId, userId }: { teamId: string; actorId: string; userId: string }): Promise<void> {
  await withTeamAccounts(teamId, async (db) => {
    const owners = await lockOwners(db, teamId);
    const role = await findMemberRole(db, { teamId, userId });
    if (role === undefined) throw new AppError("not-found", "There is no such member.");
    if (owners.length === 1 && owners[0] === userId) {
      throw new AppError("conflict", "A team needs an owner. Make somebody else owner first.");
    }
    await deleteMember(db, { teamId, userId });
    const action = actorId === userId ? "member.left" : "member.removed";
    await recordAudit(db, { teamId, actorId, action, subjectKind: "member", subjectId: userId, detail: { role } });
  });
}
