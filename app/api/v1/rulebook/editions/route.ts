import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listEditions } from "@/lib/use-cases/rulebook/list-editions";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listEditions, listEditions, { input: ({ query }) => query, answer: (content) => ({ content }) }),
});
