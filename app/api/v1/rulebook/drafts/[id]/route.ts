import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getDraft } from "@/lib/use-cases/rulebook/get-draft";
import { saveDraft } from "@/lib/use-cases/rulebook/save-draft";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getDraft, getDraft, { input: ({ params }) => params, answer: (content) => ({ content }) }),
  PATCH: apiRoute(operations.saveDraft, saveDraft, { input: ({ params, body }) => ({ id: params.id, changes: body }), answer: (content) => ({ content }) }),
});
