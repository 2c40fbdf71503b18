import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { tryRules } from "@/lib/use-cases/rulebook/try-rules";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.tryRules, tryRules, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});
