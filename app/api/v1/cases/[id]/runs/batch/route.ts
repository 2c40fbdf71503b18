import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { recordRuns } from "@/lib/use-cases/runs/record-runs";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.recordRuns, recordRuns, {
    input: ({ params, body, idempotencyKey }) => ({ caseRef: params.id, reports: body, idempotencyKey }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed ? 200 : 201 }),
  }),
});
