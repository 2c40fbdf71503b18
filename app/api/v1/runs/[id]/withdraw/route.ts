import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { withdrawRun } from "@/lib/use-cases/runs/withdraw-run";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.withdrawRun, withdrawRun, { input: ({ params, body }) => ({ id: params.id, reason: body.reason }), answer: (content) => ({ content }) }),
});
