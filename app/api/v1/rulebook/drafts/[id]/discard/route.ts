import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { discardDraft } from "@/lib/use-cases/rulebook/discard-draft";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.discardDraft, discardDraft, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
