import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { deleteWebhook } from "@/lib/use-cases/webhooks/delete-webhook";
import { updateWebhook } from "@/lib/use-cases/webhooks/update-webhook";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  PATCH: apiRoute(operations.updateWebhook, updateWebhook, { input: ({ params, body }) => ({ id: params.id, changes: body }), answer: (content) => ({ content }) }),
  DELETE: apiRoute(operations.deleteWebhook, deleteWebhook, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
