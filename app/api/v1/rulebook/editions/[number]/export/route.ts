import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { textResponse } from "@/lib/api/stream-response";
import { exportEdition } from "@/lib/use-cases/rulebook/export-edition";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.exportEdition, exportEdition, {
    input: ({ params }) => ({ number: params.number === "live" ? params.number : Number(params.number) }),
    answer: ({ text, filename }) => ({ content: textResponse({ text, mediaType: "application/json", filename }) }),
  }),
});
