"use client";

import { useEffect } from "react";
import { useFormContext, useWatch } from "react-hook-form";
import { discretisationLabels, meshFamilyLabels, sizeKindLabels } from "@/lib/questionnaire/answer-labels";
import { discretisations, familiesOf, meshFamilies, sizeKinds } from "@/lib/questionnaire/answer-sets";
import type { FormValues } from "@/lib/questionnaire/form-values";
import { ChoiceQuestion, NumberQuestion } from "./question-field";

const degrees = ["1", "2", "3", "4", "5", "6"].map((value) => ({ value, label: value === "1" ? "1, lowest order" : value }));

export function MeshQuestions() {
  const { control, setValue } = useFormContext<FormValues>();
  const [discretisation, meshFamily] = useWatch({ control, name: ["discretisation", "meshFamily"] });
  const families = familiesOf[discretisation];

  // Another discretisation can rule the chosen family out: take its first one instead of leaving an answer that must be refused.
  useEffect(() => {
    const [first] = families;
    if (first && !families.includes(meshFamily)) setValue("meshFamily", first, { shouldDirty: true, shouldValidate: true });
  }, [families, meshFamily, setValue]);

  return (
    <>
      <ChoiceQuestion name="discretisation" choices={discretisations.map((value) => ({ value, label: discretisationLabels[value] }))} />
      <ChoiceQuestion name="degree" choices={degrees} />
      <ChoiceQuestion name="meshFamily" choices={meshFamilies.map((value) => ({ value, label: meshFamilyLabels[value], disabled: !families.includes(value) }))} />
      {meshFamily === "imported" ? (
        <>
          <NumberQuestion name="imported.cells" />
          <NumberQuestion name="imported.faces" />
          <NumberQuestion name="imported.boundaryFaces" />
        </>
      ) : (
        <div className="grid grid-cols-[minmax(0,2fr)_minmax(0,3fr)] gap-3">
          <ChoiceQuestion name="size.by" choices={sizeKinds.map((value) => ({ value, label: sizeKindLabels[value] }))} />
          <NumberQuestion name="size.value" />
        </div>
      )}
    </>
  );
}
