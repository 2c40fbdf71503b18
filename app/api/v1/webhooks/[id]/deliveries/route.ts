import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listDeliveries } from "@/lib/use-cases/webhooks/list-webhooks";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listDeliveries, listDeliveries, { input: ({ params, query }) => ({ id: params.id, ...query }), answer: (content) => ({ content }) }),
});
