"use client";

import { Controller, useFormContext } from "react-hook-form";
import { CheckboxLine } from "@/components/ui/checkbox";
import { FieldSet } from "@/components/ui/field";
import { capabilityLabels, priorityLabels } from "@/lib/questionnaire/answer-labels";
import { capabilities, priorities } from "@/lib/questionnaire/answer-sets";
import type { FormValues } from "@/lib/questionnaire/form-values";
import { questions } from "@/lib/questionnaire/questions";
import { ChoiceQuestion, useQuestionError } from "./question-field";

export function ProgramQuestions() {
  const { control } = useFormContext<FormValues>();
  return (
    <>
      <div className="sm:col-span-2">
        <FieldSet legend={questions.available.label} help={questions.available.help} error={useQuestionError("available")}>
          <Controller
            control={control}
            name="available"
            render={({ field }) => (
              <div className="grid gap-x-6 gap-y-3 py-1 sm:grid-cols-2">
                {capabilities.map((capability) => (
                  <CheckboxLine
                    key={capability}
                    label={capabilityLabels[capability].label}
                    help={capabilityLabels[capability].help}
                    checked={field.value.includes(capability)}
                    onCheckedChange={(checked) =>
                      field.onChange(capabilities.filter((one) => (one === capability ? checked === true : field.value.includes(one))))
                    }
                  />
                ))}
              </div>
            )}
          />
        </FieldSet>
      </div>
      <ChoiceQuestion name="priority" choices={priorities.map((value) => ({ value, label: priorityLabels[value] }))} />
    </>
  );
}
