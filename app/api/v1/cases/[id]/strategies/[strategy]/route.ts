import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { readStrategyFiles } from "@/lib/use-cases/cases/read-strategy-files";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.strategyFiles, readStrategyFiles, {
    input: ({ params }) => ({ caseRef: params.id, strategy: params.strategy }),
    answer: (content) => ({ content }),
  }),
});
