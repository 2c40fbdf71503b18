import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { createDraft } from "@/lib/use-cases/rulebook/create-draft";
import { listDrafts } from "@/lib/use-cases/rulebook/list-drafts";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listDrafts, listDrafts, { input: ({ query }) => query, answer: (content) => ({ content }) }),
  POST: apiRoute(operations.createDraft, createDraft, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});
