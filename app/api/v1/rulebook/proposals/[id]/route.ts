import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getSearch } from "@/lib/use-cases/refinement/get-search";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getSearch, getSearch, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
