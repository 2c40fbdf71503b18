import { randomBytes } from "node:crypto";
import { recordAudit } from "@/db/queries/record-audit";
import { countWebhooks, findWebhook, insertWebhook } from "@/db/queries/webhooks";
import { withTeam } from "@/db/scope";
import { newWebhookSchema, type WebhookMade } from "@/lib/api/contract/webhooks";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { resolveDestination } from "./check-address";
import { webhookNotFound, webhookView } from "./webhook-view";

/** Every run of the team is told to every webhook: a limit keeps one report from becoming hundreds of messages. */
const mostWebhooks = 20;

/** Tells an address of events from now on. Its secret is in this answer and in no other. */
export const createWebhook = defineUseCase({
  permission: "team:manage",
  input: newWebhookSchema,
  run: async ({ scope }, { url, events }): Promise<WebhookMade> => {
    await resolveDestination(url);
    const secret = randomBytes(32).toString("base64url");
    return withTeam(scope, async (db) => {
      if ((await countWebhooks(db, scope)) >= mostWebhooks) throw new AppError("conflict", `A team has at most ${mostWebhooks} webhooks; delete one first.`);
      const id = await insertWebhook(db, scope, { url, secret, events: [...new Set(events)] });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "webhook.added", subjectKind: "webhook", subjectId: id, detail: { url, events } });
      const row = await findWebhook(db, scope, id);
      if (row === null) throw webhookNotFound();
      return { ...webhookView(row), secret };
    });
  },
});
