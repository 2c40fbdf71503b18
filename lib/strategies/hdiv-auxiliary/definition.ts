import { monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "hdiv-auxiliary",
  name: "H(div) auxiliary space",
  summary: "MINRES with auxiliary-space multigrid on A + Bᵀ W⁻¹ B and the pressure mass matrix.",
  needs: ["discrete-gradient-curl", "augmented-assembly"],
  discretisations: ["rt", "bdm", "rt-hex"],
  notForReason: "No discrete gradient and curl maps are at hand for mixed virtual elements.",
  krylovMethod: "minres",
  monitoredNorm: "preconditioned",
  parameters: [monitoredToleranceParameter],
  weakSpots: [
    "Made for lowest order; above it the program must supply the interpolations.",
    "Failed in the reference runs with a pressure boundary at contrast 1e6.",
    "A cycle costs several cycles of plain multigrid.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "The count grows with refinement, or MINRES reports an indefinite preconditioner." },
  cost,
  options,
  recipe,
};
