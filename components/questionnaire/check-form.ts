import { toAnswers } from "@/lib/questionnaire/answers";
import { fromFormValues, type FormValues } from "@/lib/questionnaire/form-values";
import type { Machine } from "@/lib/questionnaire/machine";
import { questionnaireSchema, type Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import type { FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { checkSizes } from "@/lib/sizes/check-sizes";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import type { Sizes } from "@/lib/sizes/sizes";

export type SavedMachine = Machine & { id: string };

export type CheckedForm = { questionnaire: Questionnaire | null; sizes: Sizes | null; errors: FieldError[] };

/** Everything that can be said about the form's answers without the server: the questionnaire, its sizes, what is wrong where. */
export function checkForm(values: FormValues, machines: readonly SavedMachine[]): CheckedForm {
  const parsed = questionnaireSchema.safeParse(fromFormValues(values));
  if (!parsed.success) return { questionnaire: null, sizes: null, errors: fieldErrorsOf(parsed.error) };
  const { id: _id, ...machine } = machines.find((candidate) => candidate.id === values.hardware.machineId) ?? { id: null };
  const sheet = "name" in machine ? machine : null;
  if (values.hardware.machineId !== "" && sheet === null) {
    return { questionnaire: null, sizes: null, errors: [{ path: "hardware.machineId", message: "This machine sheet no longer exists; choose another." }] };
  }
  if (sheet && parsed.data.hardware.cores > sheet.coresPerNode * sheet.nodes) {
    const all = sheet.coresPerNode * sheet.nodes;
    return { questionnaire: null, sizes: null, errors: [{ path: "hardware.cores", message: `${sheet.name} has ${all} cores in all.` }] };
  }
  const answers = toAnswers(parsed.data, sheet);
  const sizes = computeSizes(answers);
  const errors = checkSizes(answers, sizes);
  return { questionnaire: errors.length === 0 ? parsed.data : null, sizes, errors };
}
