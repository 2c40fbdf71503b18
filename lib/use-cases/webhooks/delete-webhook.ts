import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { deleteWebhook as deleteRow, findWebhook } from "@/db/queries/webhooks";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { webhookNotFound } from "./webhook-view";

/** Deletes a webhook with the list of its deliveries; what still waits is not sent. */
export const deleteWebhook = defineUseCase({
  permission: "team:manage",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<{ id: string }> =>
    withTeam(scope, async (db) => {
      const row = await findWebhook(db, scope, id);
      if (row === null) throw webhookNotFound();
      await deleteRow(db, scope, id);
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "webhook.deleted", subjectKind: "webhook", subjectId: id, detail: { url: row.url } });
      return { id };
    }),
});
