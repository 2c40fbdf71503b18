import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getReplay } from "@/lib/use-cases/refinement/get-replay";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getReplay, getReplay, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
