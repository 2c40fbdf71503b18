import { z } from "zod";
import { boundaries, capabilities, contrastPatterns, discretisations, meshFamilies, priorities, sizeKinds } from "./answer-sets";
import { defaultQuestionnaire } from "./default-questionnaire";
import type { QuestionnaireInput } from "./questionnaire-schema";

/** The form's own state: numbers stay as typed until they are read, so that a draft keeps half-typed answers. */
export const formValuesSchema = z.object({
  title: z.string(),
  discretisation: z.enum(discretisations),
  degree: z.string(),
  meshFamily: z.enum(meshFamilies),
  size: z.object({ by: z.enum(sizeKinds), value: z.string() }),
  imported: z.object({ cells: z.string(), faces: z.string(), boundaryFaces: z.string() }),
  domainVolume: z.string(),
  coefficientScale: z.string(),
  anisotropy: z.string(),
  aspectRatio: z.string(),
  contrast: z.object({ ratio: z.string(), pattern: z.enum(contrastPatterns) }),
  boundary: z.enum(boundaries),
  hardware: z.object({
    machineId: z.string(),
    cores: z.string(),
    nodes: z.string(),
    memoryPerNodeGiB: z.string(),
    timeLimitSeconds: z.string(),
  }),
  tolerance: z.string(),
  repeatedSolves: z.string(),
  priority: z.enum(priorities),
  available: z.array(z.enum(capabilities)),
});
export type FormValues = z.infer<typeof formValuesSchema>;

const text = (value: number | null | undefined) => {
  if (value === null || value === undefined) return "";
  return value !== 0 && (Math.abs(value) < 1e-4 || Math.abs(value) >= 1e9) ? value.toExponential().replace("e+", "e") : String(value);
};

/** A typed number: blanks group digits, a decimal point and an exponent are understood. "" is undefined, anything else NaN. */
export function readNumber(typed: string): number | undefined {
  const compact = typed.replace(/[\s\u00a0\u2009\u202f]/g, "");
  if (compact === "") return undefined;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(compact) ? Number(compact) : Number.NaN;
}

/** A questionnaire as the form shows it. */
export function toFormValues(questionnaire: QuestionnaireInput): FormValues {
  const { size, imported, hardware, contrast } = questionnaire;
  return {
    title: questionnaire.title ?? "",
    discretisation: questionnaire.discretisation,
    degree: text(questionnaire.degree),
    meshFamily: questionnaire.meshFamily,
    size: { by: size?.by ?? defaultQuestionnaire.size.by, value: text(size?.value ?? defaultQuestionnaire.size.value) },
    imported: { cells: text(imported?.cells), faces: text(imported?.faces), boundaryFaces: text(imported?.boundaryFaces) },
    domainVolume: text(questionnaire.domainVolume ?? 1),
    coefficientScale: text(questionnaire.coefficientScale ?? 1),
    anisotropy: text(questionnaire.anisotropy ?? 1),
    aspectRatio: text(questionnaire.aspectRatio ?? 1),
    contrast: { ratio: text(contrast.ratio), pattern: contrast.pattern },
    boundary: questionnaire.boundary,
    hardware: {
      machineId: hardware.machineId ?? "",
      cores: text(hardware.cores),
      nodes: text(hardware.nodes ?? 1),
      memoryPerNodeGiB: text(hardware.memoryPerNodeGiB ?? defaultQuestionnaire.hardware.memoryPerNodeGiB),
      timeLimitSeconds: text(hardware.timeLimitSeconds),
    },
    tolerance: text(questionnaire.tolerance),
    repeatedSolves: text(questionnaire.repeatedSolves ?? 1),
    priority: questionnaire.priority ?? "time",
    available: [...(questionnaire.available ?? [])],
  };
}

/** What the form says, as the questionnaire's schema expects it; not yet checked. */
export function fromFormValues(values: FormValues): unknown {
  const importedMesh = values.meshFamily === "imported";
  const sheet = values.hardware.machineId !== "";
  const number = readNumber;
  return {
    title: values.title,
    discretisation: values.discretisation,
    degree: number(values.degree),
    meshFamily: values.meshFamily,
    ...(importedMesh
      ? { imported: { cells: number(values.imported.cells), faces: number(values.imported.faces), boundaryFaces: number(values.imported.boundaryFaces) } }
      : { size: { by: values.size.by, value: number(values.size.value) } }),
    domainVolume: number(values.domainVolume),
    coefficientScale: number(values.coefficientScale),
    anisotropy: number(values.anisotropy),
    aspectRatio: number(values.aspectRatio),
    contrast: { pattern: values.contrast.pattern, ratio: values.contrast.pattern === "constant" ? 1 : number(values.contrast.ratio) },
    boundary: values.boundary,
    hardware: {
      ...(sheet
        ? { machineId: values.hardware.machineId }
        : { nodes: number(values.hardware.nodes), memoryPerNodeGiB: number(values.hardware.memoryPerNodeGiB) }),
      cores: number(values.hardware.cores),
      timeLimitSeconds: number(values.hardware.timeLimitSeconds) ?? null,
    },
    tolerance: number(values.tolerance),
    repeatedSolves: number(values.repeatedSolves),
    priority: values.priority,
    available: values.available,
  };
}
