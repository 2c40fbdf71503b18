"use client";

import { useFormContext, useWatch } from "react-hook-form";
import { boundaryLabels, patternLabels } from "@/lib/questionnaire/answer-labels";
import { boundaries, contrastPatterns } from "@/lib/questionnaire/answer-sets";
import type { FormValues } from "@/lib/questionnaire/form-values";
import { ChoiceQuestion, NumberQuestion, TextQuestion } from "./question-field";

export function ProblemQuestions() {
  const { control } = useFormContext<FormValues>();
  const pattern = useWatch({ control, name: "contrast.pattern" });
  return (
    <>
      <div className="sm:col-span-2">
        <TextQuestion name="title" />
      </div>
      <ChoiceQuestion name="contrast.pattern" choices={contrastPatterns.map((value) => ({ value, label: patternLabels[value] }))} />
      {pattern !== "constant" && <NumberQuestion name="contrast.ratio" />}
      <ChoiceQuestion name="boundary" choices={boundaries.map((value) => ({ value, label: boundaryLabels[value] }))} />
      <NumberQuestion name="tolerance" />
      <NumberQuestion name="repeatedSolves" />
    </>
  );
}
