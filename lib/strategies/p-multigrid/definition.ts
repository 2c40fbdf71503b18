import { gammaParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "p-multigrid",
  name: "p-multigrid, augmented block",
  summary: "FGMRES with p-multigrid and patch smoothers on the augmented velocity block.",
  needs: ["mesh-hierarchy", "augmented-assembly"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "fgmres",
  monitoredNorm: "unpreconditioned",
  parameters: [gammaParameter],
  weakSpots: [
    "Patch smoothers need the program's mesh and element data.",
    "At degree 1 there is no coarser degree: it is geometric multigrid with a patch smoother.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "A cycle costs more than ten products with the matrix, or counts grow with the degree." },
  cost,
  options,
  recipe,
};
