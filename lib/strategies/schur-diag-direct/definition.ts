import { monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "schur-diag-direct",
  name: "Diagonal Schur, factorised",
  summary: "MINRES with diag(A) and the factorised approximate Schur complement B diag(A)⁻¹ Bᵀ.",
  needs: ["parallel-direct", "block-splitting"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "minres",
  monitoredNorm: "preconditioned",
  parameters: [monitoredToleranceParameter],
  weakSpots: [
    "Iterations grow with the degree and with badly shaped cells, through the spectrum of diag(A)⁻¹ A.",
    "On many cores the substitution with the Schur factor stops scaling.",
    "The true residual can lag the monitored one at contrast.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "Factorising the Schur complement takes more than half of the total time, or its memory grows past the matrix's." },
  cost,
  options,
  recipe,
};
