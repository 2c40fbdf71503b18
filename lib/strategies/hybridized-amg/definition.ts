import { monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "hybridized-amg",
  name: "Hybridised, CG with multigrid",
  summary: "Static condensation to face multipliers: a symmetric positive definite system for CG with multigrid.",
  needs: ["hybridised-assembly", "amg"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "cg",
  monitoredNorm: "preconditioned",
  parameters: [monitoredToleranceParameter],
  weakSpots: [
    "Needs the program to assemble with discontinuous velocities and multipliers.",
    "Condensing inverts a dense matrix in every cell: costly at high degree and for cells with many faces.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "CG takes more than three times the predicted iterations, or the condensed matrix loses definiteness." },
  cost,
  options,
  recipe,
};
