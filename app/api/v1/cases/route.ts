import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { createCase } from "@/lib/use-cases/cases/create-case";
import { listCases } from "@/lib/use-cases/cases/list-cases";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listCases, listCases, { input: ({ query }) => query, answer: (content) => ({ content }) }),
  POST: apiRoute(operations.createCase, createCase, {
    input: ({ body, idempotencyKey }) => ({ questionnaire: body.questionnaire, idempotencyKey }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed ? 200 : 201 }),
  }),
});
