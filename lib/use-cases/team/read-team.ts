import { z } from "zod";
import { listPendingInvitations, type PendingInvitation } from "@/db/queries/team-invitations";
import { listTeamKeys, type TeamKey } from "@/db/queries/team-keys";
import { listMembers, type TeamMember } from "@/db/queries/team-members";
import { withTeam, withTeamAccounts } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { mayRole } from "@/lib/auth/permissions";

/** An invitation without the secret of its link, unless the reader may revoke it. */
export type ShownInvitation = Omit<PendingInvitation, "id"> & { id: string | null };
export type TeamView = { members: TeamMember[]; invitations: ShownInvitation[]; keys: TeamKey[]; mayManage: boolean };

/** Everything the team page shows. The keys' own text is not among it: nobody can read it after it was made. */
export const readTeam = defineUseCase({
  permission: "team:read",
  input: z.strictObject({}),
  run: async ({ scope }): Promise<TeamView> => {
    const mayManage = mayRole(scope.role, "team:manage");
    const { members, pending } = await withTeam(scope, async (db) => ({
      members: await listMembers(db, scope),
      pending: await listPendingInvitations(db, scope, { now: new Date() }),
    }));
    const keys = await withTeamAccounts(scope.teamId, (db) => listTeamKeys(db, scope.teamId));
    return { members, invitations: pending.map((invitation) => ({ ...invitation, id: mayManage ? invitation.id : null })), keys, mayManage };
  },
});
