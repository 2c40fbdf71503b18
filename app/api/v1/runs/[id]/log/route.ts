import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getRunLog } from "@/lib/use-cases/logs/get-run-log";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getRunLog, getRunLog, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
