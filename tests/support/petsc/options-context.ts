import { defaultRates } from "@/lib/questionnaire/machine";
import type { Discretisation, MeshFamily } from "@/lib/questionnaire/answer-sets";
import type { OptionsContext } from "@/lib/strategies/strategy";

type Case = {
  discretisation?: Discretisation;
  meshFamily?: MeshFamily;
  degree?: number;
  contrast?: number;
  boundary?: "flux-everywhere" | "pressure-somewhere";
  tolerance?: number;
  cells?: number;
  velocityUnknowns?: number;
  pressureUnknowns?: number;
  parameters?: Record<string, number | string>;
  iterationsHigh?: number;
  memoryGiBHigh?: number;
  cores?: number;
  nodes?: number;
  memoryPerNodeGiB?: number;
  timeLimitSeconds?: number | null;
  coefficientScale?: number;
};

/** What an options file is written from, for a case on the unit cube. */
export function optionsContext(given: Case = {}): OptionsContext {
  const { cells = 29_791, degree = 1, velocityUnknowns = 366_141, pressureUnknowns = 29_791, cores = 32, nodes = 1 } = given;
  const { contrast = 1, boundary = "flux-everywhere" } = given;
  return {
    answers: {
      discretisation: given.discretisation ?? "vem-mixed",
      degree,
      meshFamily: given.meshFamily ?? "cubes",
      size: { by: "cells", value: cells },
      domainVolume: 1,
      coefficientScale: given.coefficientScale ?? 1,
      anisotropy: 1,
      aspectRatio: 1,
      contrast: { ratio: contrast, pattern: contrast > 1 ? "blocks" : "constant" },
      boundary,
      tolerance: given.tolerance ?? 1e-6,
      repeatedSolves: 1,
      priority: "time",
      available: [],
      hardware: {
        ...defaultRates,
        cores,
        nodes,
        coresPerNode: Math.ceil(cores / nodes),
        memoryPerNodeGiB: given.memoryPerNodeGiB ?? 128,
        timeLimitSeconds: given.timeLimitSeconds ?? null,
        machineName: null,
      },
    },
    sizes: {
      cells,
      faces: 3 * cells,
      boundaryFaces: Math.round(6 * cells ** (2 / 3)),
      facesPerCell: 6,
      spacing: Math.cbrt(1 / cells),
      divisions: null,
      velocityUnknowns,
      pressureUnknowns,
      unknowns: velocityUnknowns + pressureUnknowns,
      eliminatedVelocityUnknowns: 0,
      perFace: 1,
      perCellVelocity: 0,
      perCellPressure: 1,
      nonzeros: { velocityBlock: 10 * velocityUnknowns, divergenceBlock: 6 * pressureUnknowns, total: 10 * velocityUnknowns + 12 * pressureUnknowns },
      schurNonzeros: 7 * pressureUnknowns,
      exact: true,
    },
    parameters: given.parameters ?? {},
    iterationsHigh: given.iterationsHigh ?? 60,
    memoryGiBHigh: given.memoryGiBHigh ?? 10,
  };
}
