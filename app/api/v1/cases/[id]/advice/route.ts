import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { adviseAgain } from "@/lib/use-cases/cases/advise-again";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.adviseAgain, adviseAgain, {
    input: ({ params, idempotencyKey }) => ({ caseRef: params.id, idempotencyKey }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed ? 200 : 201 }),
  }),
});
