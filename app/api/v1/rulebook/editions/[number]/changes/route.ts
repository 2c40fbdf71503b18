import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { compareEditions } from "@/lib/use-cases/rulebook/compare-editions";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.compareEditions, compareEditions, { input: ({ params }) => ({ number: Number(params.number) }), answer: (content) => ({ content }) }),
});
