import { operations } from "@/lib/api/contract";
import { importLimitBytes, readChunks } from "@/lib/api/read-body";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { importRuns } from "@/lib/use-cases/runs/import-runs";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.importRuns, importRuns, {
    input: ({ request, idempotencyKey }) => ({
      format: request.headers.get("content-type")?.toLowerCase().startsWith("text/csv") ? "csv" : "ndjson",
      chunks: readChunks(request, importLimitBytes),
      idempotencyKey,
    }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed ? 200 : 201 }),
  }),
});
