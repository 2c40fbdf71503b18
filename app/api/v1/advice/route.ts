import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { advise } from "@/lib/use-cases/advice/advise";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.advise, advise, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});
