import type { StrategyId } from "@/lib/shared/strategy-ids";
import { cost as bddc } from "./bddc/cost";
import type { CostModel } from "./cost";
import { cost as directBlr } from "./direct-blr/cost";
import { cost as directLdlt } from "./direct-ldlt/cost";
import { cost as hdivAuxiliary } from "./hdiv-auxiliary/cost";
import { cost as hybridizedAmg } from "./hybridized-amg/cost";
import { cost as pMultigrid } from "./p-multigrid/cost";
import { cost as regularizedAmg } from "./regularized-amg/cost";
import { cost as schurDiagAmg } from "./schur-diag-amg/cost";
import { cost as schurDiagDirect } from "./schur-diag-direct/cost";
import { cost as schurTriangular } from "./schur-triangular/cost";
import { cost as schwarzTwoLevel } from "./schwarz-two-level/cost";

/** The cost models alone, without the definitions' texts and options files: what the estimates and the browser need. */
export const strategyCosts: Record<StrategyId, CostModel> = {
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
