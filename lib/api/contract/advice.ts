import { adviceSchema } from "@/lib/advice/advice";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { defineOperation } from "../operation";

export const adviceOperations = {
  advise: defineOperation({
    id: "advise",
    method: "POST",
    path: "/api/v1/advice",
    tag: "Advice",
    summary: "Sizes and ranked strategies for a questionnaire; saves nothing",
    permission: "cases:read",
    body: { kind: "json", schema: questionnaireSchema },
    response: { kind: "json", schema: adviceSchema },
  }),
};
