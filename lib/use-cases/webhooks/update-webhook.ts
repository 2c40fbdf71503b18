import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { findWebhook, updateWebhook as updateRow } from "@/db/queries/webhooks";
import { withTeam } from "@/db/scope";
import { webhookChangeSchema, type WebhookView } from "@/lib/api/contract/webhooks";
import { defineUseCase } from "@/lib/auth/guard";
import { resolveDestination } from "./check-address";
import { webhookNotFound, webhookView } from "./webhook-view";

/** Changes a webhook's address or events, or switches it off and on; its secret stays. */
export const updateWebhook = defineUseCase({
  permission: "team:manage",
  input: z.strictObject({ id: z.uuid(), changes: webhookChangeSchema }),
  run: async ({ scope }, { id, changes: { url, events, enabled } }): Promise<WebhookView> => {
    // Asked first, so that an absent or foreign webhook is not found whatever the change says.
    if ((await withTeam(scope, (db) => findWebhook(db, scope, id))) === null) throw webhookNotFound();
    if (url !== undefined) await resolveDestination(url);
    const changes = { ...(url === undefined ? {} : { url }), ...(events === undefined ? {} : { events: [...new Set(events)] }), ...(enabled === undefined ? {} : { enabled }) };
    return withTeam(scope, async (db) => {
      if (Object.keys(changes).length > 0) {
        await updateRow(db, scope, { id, changes });
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "webhook.changed", subjectKind: "webhook", subjectId: id, detail: changes });
      }
      const row = await findWebhook(db, scope, id);
      if (row === null) throw webhookNotFound();
      return webhookView(row);
    });
  },
});
