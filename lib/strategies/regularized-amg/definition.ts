import { gammaParameter, monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "regularized-amg",
  name: "Regularised block, multigrid",
  summary: "MINRES with multigrid on A + γ Bᵀ W⁻¹ B and the scaled pressure mass matrix W / γ.",
  needs: ["amg", "augmented-assembly"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "minres",
  monitoredNorm: "preconditioned",
  parameters: [gammaParameter, monitoredToleranceParameter],
  weakSpots: [
    "Plain multigrid does not see the kernel of the divergence: iterations grow nearly as 1/h even at the best γ.",
    "γ away from the h² rule by a factor ten costs half as many iterations again.",
    "Degrades with the contrast.",
  ],
  fallback: { strategy: "hdiv-auxiliary", when: "Iterations double when the mesh is refined once, or a γ ten times off does no worse." },
  cost,
  options,
  recipe,
};
