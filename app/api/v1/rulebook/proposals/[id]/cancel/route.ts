import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { cancelSearch } from "@/lib/use-cases/refinement/cancel-search";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.cancelSearch, cancelSearch, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
