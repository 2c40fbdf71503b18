import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { textResponse } from "@/lib/api/stream-response";
import { readBatchScript } from "@/lib/use-cases/cases/read-strategy-files";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.batchScript, readBatchScript, {
    input: ({ params }) => ({ caseRef: params.id, strategy: params.strategy }),
    answer: (file) => ({ content: textResponse({ ...file, mediaType: "text/x-shellscript" }) }),
  }),
});
