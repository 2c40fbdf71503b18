import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { streamResponse } from "@/lib/api/stream-response";
import { exportTeam } from "@/lib/use-cases/record/export-team";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.exportTeam, exportTeam, {
    input: ({ query }) => query,
    answer: ({ pieces, format }) => ({
      content: streamResponse({
        pieces,
        mediaType: format === "json" ? "application/json; charset=utf-8" : "application/x-ndjson; charset=utf-8",
        filename: `saddlemark-export.${format}`,
      }),
    }),
  }),
});
