import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema, type QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";

/** Answers of the default questionnaire with some fields replaced. */
export function caseAnswers(changes: Partial<QuestionnaireInput> = {}): Answers {
  return toAnswers(questionnaireSchema.parse({ ...defaultQuestionnaire, ...changes }), null);
}
