import type fc from "fast-check";
import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import { checkSizes } from "@/lib/sizes/check-sizes";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { arbitraryQuestionnaire } from "./arbitrary-questionnaire";

/** Answers of random valid questionnaires that also pass the checks of sizes. */
export const arbitraryAnswers: fc.Arbitrary<Answers> = arbitraryQuestionnaire
  .map((questionnaire) => toAnswers(questionnaire, null))
  .filter((answers) => checkSizes(answers, computeSizes(answers)).length === 0);
