import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "direct-blr",
  name: "Sparse direct, block low-rank",
  summary: "The same factorisation with off-diagonal blocks of large fronts compressed, and a few steps of refinement.",
  needs: ["parallel-direct"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "gmres",
  monitoredNorm: "unpreconditioned",
  parameters: [],
  weakSpots: [
    "Pays on large fronts only; on small systems compression costs more than it saves.",
    "The drop tolerance limits the accuracy: refinement must follow.",
  ],
  fallback: { strategy: "direct-ldlt", when: "Refinement stalls above the tolerance, or the compressed factor is not smaller than 0.8 of the full one." },
  cost,
  options,
  recipe,
};
