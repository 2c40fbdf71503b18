import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getEdition } from "@/lib/use-cases/rulebook/get-edition";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getEdition, getEdition, {
    input: ({ params }) => ({ number: params.number === "live" ? params.number : Number(params.number) }),
    answer: (content) => ({ content }),
  }),
});
