import { monitoredToleranceParameter } from "../parameters";
import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "schur-diag-amg",
  name: "Diagonal Schur, multigrid",
  summary: "MINRES with diag(A) and one algebraic multigrid cycle on the approximate Schur complement.",
  needs: ["amg", "block-splitting"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "minres",
  monitoredNorm: "preconditioned",
  parameters: [monitoredToleranceParameter],
  weakSpots: [
    "Aggregation multigrid with default settings degrades at contrast (59 to 423 iterations at 1e4 in the reference runs); classical multigrid does not.",
    "Iterations grow with the degree.",
    "The true residual can lag the monitored one at contrast.",
  ],
  fallback: { strategy: "schur-diag-direct", when: "More than 1.5 times the predicted iterations: the multigrid cycle has lost the Schur complement." },
  cost,
  options,
  recipe,
};
