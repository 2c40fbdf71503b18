import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listSearches } from "@/lib/use-cases/refinement/list-searches";
import { startSearch } from "@/lib/use-cases/refinement/start-search";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listSearches, listSearches, { input: () => ({}), answer: (content) => ({ content }) }),
  POST: apiRoute(operations.startSearch, startSearch, { input: () => ({}), answer: (content) => ({ content }) }),
});
