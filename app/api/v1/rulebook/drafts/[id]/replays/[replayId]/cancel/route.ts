import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { cancelReplay } from "@/lib/use-cases/refinement/cancel-replay";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.cancelReplay, cancelReplay, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
