import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listLogMappings } from "@/lib/use-cases/logs/list-log-mappings";
import { createLogMapping } from "@/lib/use-cases/logs/save-log-mapping";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listLogMappings, listLogMappings, { input: ({ query }) => query, answer: (content) => ({ content }) }),
  POST: apiRoute(operations.createLogMapping, createLogMapping, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});
