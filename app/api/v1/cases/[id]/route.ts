import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { getCase } from "@/lib/use-cases/cases/get-case";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.getCase, getCase, { input: ({ params }) => ({ caseRef: params.id }), answer: (content) => ({ content }) }),
});
