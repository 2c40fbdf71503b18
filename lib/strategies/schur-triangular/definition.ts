import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "schur-triangular",
  name: "Block triangular Schur, FGMRES",
  summary: "FGMRES with a block factorisation: diag(A) and one multigrid cycle on the approximate Schur complement; monitors the true residual.",
  needs: ["amg", "block-splitting"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "fgmres",
  monitoredNorm: "unpreconditioned",
  parameters: [],
  weakSpots: [
    "Keeps its Krylov vectors: memory and orthogonalisation grow with the iterations up to the restart.",
    "With a pressure boundary at contrast 1e6 the iterations grew to two hundred in the reference runs.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "The residual plateaus after each restart, or memory for the Krylov vectors runs short." },
  cost,
  options,
  recipe,
};
