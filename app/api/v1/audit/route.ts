import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listAudit } from "@/lib/use-cases/record/list-audit";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listAudit, listAudit, { input: ({ query }) => query, answer: (content) => ({ content }) }),
});
