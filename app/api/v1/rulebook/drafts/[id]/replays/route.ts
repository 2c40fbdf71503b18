import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listReplays } from "@/lib/use-cases/refinement/list-replays";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listReplays, listReplays, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
