import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { correctRun } from "@/lib/use-cases/runs/correct-run";
import { getRun } from "@/lib/use-cases/runs/get-run";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getRun, getRun, { input: ({ params }) => params, answer: (content) => ({ content }) }),
  PATCH: apiRoute(operations.correctRun, correctRun, { input: ({ params, body }) => ({ id: params.id, correction: body }), answer: (content) => ({ content }) }),
});
