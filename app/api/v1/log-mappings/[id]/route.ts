import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { deleteLogMapping } from "@/lib/use-cases/logs/delete-log-mapping";
import { updateLogMapping } from "@/lib/use-cases/logs/save-log-mapping";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  PATCH: apiRoute(operations.updateLogMapping, updateLogMapping, { input: ({ params, body }) => ({ id: params.id, mapping: body }), answer: (content) => ({ content }) }),
  DELETE: apiRoute(operations.deleteLogMapping, deleteLogMapping, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
