import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { publishDraft } from "@/lib/use-cases/rulebook/publish-draft";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.publishDraft, publishDraft, { input: ({ params, body }) => ({ id: params.id, approval: body }), answer: (content) => ({ content }) }),
});
