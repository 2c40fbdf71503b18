import { operations } from "@/lib/api/contract";
import { logLimitBytes } from "@/lib/api/contract/logs";
import { readChunks } from "@/lib/api/read-body";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { encodingOf } from "@/lib/api/unpack-body";
import { readLog } from "@/lib/use-cases/logs/read-log";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  POST: apiRoute(operations.readLog, readLog, {
    input: ({ params, query, request, idempotencyKey }) => ({
      caseRef: params.id,
      query,
      chunks: readChunks(request, logLimitBytes),
      encoding: encodingOf(request.headers.get("content-encoding")),
      idempotencyKey,
    }),
    answer: ({ replayed, response }) => ({ content: response, status: replayed || response.runId === null ? 200 : 201 }),
  }),
});
