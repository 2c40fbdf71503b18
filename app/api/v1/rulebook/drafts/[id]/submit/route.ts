import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { submitDraft } from "@/lib/use-cases/rulebook/submit-draft";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.submitDraft, submitDraft, { input: ({ params, body }) => ({ id: params.id, submission: body }), answer: (content) => ({ content }) }),
});
