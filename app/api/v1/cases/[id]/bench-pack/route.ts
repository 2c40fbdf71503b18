import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { archiveResponse } from "@/lib/api/stream-response";
import { makeBenchPack } from "@/lib/use-cases/bench-packs/make-bench-pack";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.benchPack, makeBenchPack, {
    input: ({ params, query }) => ({ caseRef: params.id, strategies: query.strategies }),
    answer: (file) => ({ content: archiveResponse(file) }),
  }),
});
