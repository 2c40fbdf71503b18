import type { StrategyId } from "@/lib/shared/strategy-ids";
import { definition as bddc } from "./bddc/definition";
import { definition as directBlr } from "./direct-blr/definition";
import { definition as directLdlt } from "./direct-ldlt/definition";
import { definition as hdivAuxiliary } from "./hdiv-auxiliary/definition";
import { definition as hybridizedAmg } from "./hybridized-amg/definition";
import { definition as pMultigrid } from "./p-multigrid/definition";
import { definition as regularizedAmg } from "./regularized-amg/definition";
import { definition as schurDiagAmg } from "./schur-diag-amg/definition";
import { definition as schurDiagDirect } from "./schur-diag-direct/definition";
import { definition as schurTriangular } from "./schur-triangular/definition";
import { definition as schwarzTwoLevel } from "./schwarz-two-level/definition";
import type { StrategyDefinition } from "./strategy";

/** Every strategy's definition by its id; adding a strategy is adding a folder and its line here. */
export const strategies: Record<StrategyId, StrategyDefinition> = {
  "direct-ldlt": directLdlt,
  "direct-blr": directBlr,
  "schur-diag-direct": schurDiagDirect,
  "schur-diag-amg": schurDiagAmg,
  "schur-triangular": schurTriangular,
  "regularized-amg": regularizedAmg,
  "hdiv-auxiliary": hdivAuxiliary,
  "hybridized-amg": hybridizedAmg,
  bddc,
  "schwarz-two-level": schwarzTwoLevel,
  "p-multigrid": pMultigrid,
};
