import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { readScalingCurves } from "@/lib/use-cases/cases/read-scaling-curves";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.scalingCurves, readScalingCurves, {
    input: ({ params, query }) => ({ caseRef: params.id, over: query.over }),
    answer: (content) => ({ content }),
  }),
});
