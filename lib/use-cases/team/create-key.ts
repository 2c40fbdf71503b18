import { recordAudit } from "@/db/queries/record-audit";
import { deleteTeamKey } from "@/db/queries/team-keys";
import { withTeamAccounts } from "@/db/scope";
import { getAuth } from "@/lib/auth/auth";
import { defineUseCase } from "@/lib/auth/guard";
import { createKeySchema } from "@/lib/auth/team-schemas";

/** Makes a key of the team for scripts. Its text is in this answer and nowhere else: the database holds a hash. */
export const createKey = defineUseCase({
  permission: "keys:manage",
  input: createKeySchema,
  run: async ({ scope }, { name, scope: keyScope }): Promise<{ id: string; key: string }> => {
    const { teamId, userId } = scope;
    const permissions = { saddlemark: keyScope === "write" ? ["read", "write"] : ["read"] };
    const made = await getAuth().api.createApiKey({ body: { name, userId, permissions, metadata: { teamId, scope: keyScope } } });
    try {
      await withTeamAccounts(teamId, (db) =>
        recordAudit(db, { teamId, actorId: userId, action: "key.made", subjectKind: "key", subjectId: made.id, detail: { name, scope: keyScope } }),
      );
    } catch (error) {
      // better-auth stores the key on a connection of its own; without its audit row it must not live.
      await withTeamAccounts(teamId, (db) => deleteTeamKey(db, { teamId, id: made.id }));
      throw error;
    }
    return { id: made.id, key: made.key };
  },
});
