import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { withdrawDraft } from "@/lib/use-cases/rulebook/withdraw-draft";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.withdrawDraft, withdrawDraft, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
