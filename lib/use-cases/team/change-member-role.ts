import { recordAudit } from "@/db/queries/record-audit";
import { findMemberRole, lockOwners, updateMemberRole } from "@/db/queries/team-members";
import { withTeamAccounts } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { changeRoleSchema } from "@/lib/auth/team-schemas";

/** Gives a member another role. Throws AppError "not-found", or "conflict" for the only owner. */
export const changeMemberRole = defineUseCase({
  permission: "team:manage",
  input: changeRoleSchema,
  run: async ({ scope }, { userId, role }): Promise<void> => {
    const { teamId } = scope;
    await withTeamAccounts(teamId, async (db) => {
      const owners = await lockOwners(db, teamId);
      const before = await findMemberRole(db, { teamId, userId });
      if (before === undefined) throw new AppError("not-found", "There is no such member.");
      if (before === role) return;
      if (owners.length === 1 && owners[0] === userId) {
        throw new AppError("conflict", "A team needs an owner. Make somebody else owner first.");
      }
      await updateMemberRole(db, { teamId, userId, role });
      await recordAudit(db, { teamId, actorId: scope.userId, action: "member.role-changed", subjectKind: "member", subjectId: userId, detail: { before, after: role } });
    });
  },
});
