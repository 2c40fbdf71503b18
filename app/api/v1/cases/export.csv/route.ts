import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { streamResponse } from "@/lib/api/stream-response";
import { exportCases } from "@/lib/use-cases/cases/export-cases";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.exportCases, exportCases, {
    input: ({ query }) => query,
    answer: (pieces) => ({ content: streamResponse({ pieces, mediaType: "text/csv; charset=utf-8", filename: "saddlemark-cases.csv" }) }),
  }),
});
