import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { listRuleRecords } from "@/lib/use-cases/refinement/list-rule-records";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listRuleRecords, listRuleRecords, { input: () => ({}), answer: (content) => ({ content }) }),
});
