import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { copyCase } from "@/lib/use-cases/cases/copy-case";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.copyCase, copyCase, { input: ({ params }) => ({ caseRef: params.id }), answer: (content) => ({ content }) }),
});
