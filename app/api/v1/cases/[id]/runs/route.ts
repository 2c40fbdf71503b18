import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listRuns } from "@/lib/use-cases/runs/list-runs";
import { recordRun } from "@/lib/use-cases/runs/record-run";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listRuns, listRuns, { input: ({ params, query }) => ({ caseRef: params.id, ...query }), answer: (content) => ({ content }) }),
  POST: apiRoute(operations.recordRun, recordRun, {
    input: ({ params, body, idempotencyKey }) => ({ caseRef: params.id, report: body, idempotencyKey }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed ? 200 : 201 }),
  }),
});
