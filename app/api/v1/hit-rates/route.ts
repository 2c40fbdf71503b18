import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { readHitRates } from "@/lib/use-cases/hit-rates/read-hit-rates";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.hitRates, readHitRates, { input: ({ query }) => query, answer: (content) => ({ content }) }),
});
