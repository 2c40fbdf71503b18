import { monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "schwarz-two-level",
  name: "Two-level Schwarz",
  summary: "MINRES with diag(A) and overlapping additive Schwarz with a coarse space on the Schur complement.",
  needs: ["block-splitting"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "minres",
  monitoredNorm: "preconditioned",
  parameters: [monitoredToleranceParameter],
  weakSpots: [
    "Without a coarse space that follows the coefficient, jumps along subdomain boundaries spoil it.",
    "Overlap multiplies the local factorisations at few cells a core.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "Iterations grow when cores are added at the same mesh." },
  cost,
  options,
  recipe,
};
