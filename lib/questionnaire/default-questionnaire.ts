import type { QuestionnaireInput } from "./questionnaire-schema";

/** The answers a new case starts from: a common Darcy set-up on one 32-core node. */
export const defaultQuestionnaire = {
  title: "",
  discretisation: "vem-mixed",
  degree: 1,
  meshFamily: "cubes",
  size: { by: "unknowns", value: 400_000 },
  domainVolume: 1,
  coefficientScale: 1,
  anisotropy: 1,
  aspectRatio: 1,
  contrast: { ratio: 1, pattern: "constant" },
  boundary: "flux-everywhere",
  hardware: { cores: 32, nodes: 1, memoryPerNodeGiB: 128, timeLimitSeconds: null },
  tolerance: 1e-6,
  repeatedSolves: 1,
  priority: "time",
  available: ["parallel-direct", "amg", "block-splitting"],
} satisfies QuestionnaireInput;
