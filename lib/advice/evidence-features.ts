import { meshFamilies, type Discretisation, type MeshFamily } from "@/lib/questionnaire/answer-sets";
import type { Answers } from "@/lib/questionnaire/answers";
import type { Sizes } from "@/lib/sizes/sizes";

/** What of a case the evidence looks at. */
export type EvidenceFeatures = {
  unknowns: number;
  degree: number;
  contrastRatio: number;
  cores: number;
  meshFamily: MeshFamily;
  /** Used to find the nearest cases, not by the regression. */
  discretisation: Discretisation;
};

export function evidenceFeaturesOf(answers: Answers, sizes: Sizes): EvidenceFeatures {
  return {
    unknowns: sizes.unknowns,
    degree: answers.degree,
    contrastRatio: answers.contrast.ratio,
    cores: answers.hardware.cores,
    meshFamily: answers.meshFamily,
    discretisation: answers.discretisation,
  };
}

/**
 * Scaled numeric features, each about one unit wide over a team's usual work: log10(unknowns) - 5.5; degree - 2; log10(contrast) / 3;
 * log8(cores / 32).
 */
export function scaledFeatures({ unknowns, degree, contrastRatio, cores }: EvidenceFeatures): number[] {
  return [Math.log10(Math.max(1, unknowns)) - 5.5, degree - 2, Math.log10(contrastRatio) / 3, Math.log2(cores / 32) / 3];
}

/** One row of the regression's design: constant, scaled features, one indicator for each mesh family. */
export function designRow(features: EvidenceFeatures): number[] {
  return [1, ...scaledFeatures(features), ...meshFamilies.map((family) => (family === features.meshFamily ? 1 : 0))];
}
