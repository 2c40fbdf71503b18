import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { startReplay } from "@/lib/use-cases/refinement/start-replay";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.startReplay, startReplay, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
