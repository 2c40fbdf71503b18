import { constants as modelConstants, type ModelConstants } from "@/lib/estimates/constants";
import { makeKit } from "@/lib/estimates/make-kit";
import { measuringMachine } from "@/lib/estimates/measuring-machine";
import { advisedVariant, type Variant } from "@/lib/estimates/variant";
import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import type { CostKit, IterationCount, StrategyCost } from "@/lib/strategies/cost";
import { strategyCosts } from "@/lib/strategies/costs";
import type { MeasuredRun } from "./read-runs";

const machineId = "00000000-0000-4000-8000-000000000001";

const strategyOf: Record<string, StrategyId> = {
  S1: "direct-ldlt",
  S2: "schur-diag-direct",
  S3: "schur-diag-amg",
  S4: "regularized-amg",
  S5: "schur-triangular",
  S6: "hybridized-amg",
  S7: "hdiv-auxiliary",
};

/** Variants of a strategy that are ways of running it; the others (exact blocks, restarts, other smoothers) are experiments. */
const ways: Record<string, Partial<Variant>> = {
  mumps_ldlt_pin: {},
  mumps_ldlt_pin_cap2GiB: {},
  mumps_ldlt_pin_amf: {},
  mumps_ldlt_pin_amd: {},
  mumps_ldlt_pin_qamd: {},
  mumps_ldlt_pin_pord: {},
  mumps_ldlt_pin_metis: {},
  mumps_ldlt_pin_scotch: {},
  mumps_ldlt_pin_icntl12_1: {},
  mumps_ldlt_pin_icntl12_1_pord: {},
  mumps_ldlt_pin_icntl14_100: {},
  mumps_ldlt_icntl24: {},
  mumps_ldlt_none: {},
  mumps_lu_pin: { factorisation: "lu" },
  mumps_lu_pin_cap1GiB: { factorisation: "lu" },
  mumps_lu_icntl24: { factorisation: "lu" },
  mumps_lu_none: { factorisation: "lu" },
  minres: {},
  gmres: { krylov: "gmres" },
  minres_hypre: { multigrid: "classical" },
  minres_hypreHMIS: { multigrid: "sparse" },
  minres_gamg: { multigrid: "aggregation" },
  fgmres_hypre: { multigrid: "classical", krylov: "fgmres" },
  fgmres_full_jacobi_hypre: { multigrid: "classical" },
  fgmres_lower_jacobi_hypre: { multigrid: "classical", blocks: "triangular" },
  fgmres_upper_jacobi_hypre: { multigrid: "classical", blocks: "triangular" },
  cg_hypre: { multigrid: "classical" },
  cg_gamg: { multigrid: "aggregation" },
  minres_ads: {},
  fgmres_gamg: { multigrid: "aggregation", krylov: "fgmres" },
};

export type RunCase = { run: MeasuredRun; strategy: StrategyId; answers: Answers; variant: Variant };

/** The questionnaire, set-up and strategy behind a measured run; null for experiments that are no strategy's way of running. */
export function caseOf(run: MeasuredRun): RunCase | null {
  const strategy = strategyOf[run.solver];
  const way = ways[run.variant];
  if (strategy === undefined || way === undefined) return null;
  const minimumFill = run.mumps_infog7_ordering !== "" && run.mumps_infog7_ordering !== "4";
  const ordering = run.solver === "S1" && minimumFill ? "minimum-fill" : "nested-dissection";
  return { run, strategy, answers: answersOf(run), variant: { ...advisedVariant, ...way, ordering } };
}

function answersOf(run: MeasuredRun): Answers {
  const discretisation = ({ RT: "rt", BDM: "bdm", NCF: "rt-hex" } as const)[run.family];
  const meshFamily = ({ structured_tet: "tetrahedra", jittered_tet: "distorted", structured_hex: "cubes" } as const)[run.mesh_family];
  const pattern = ({ uniform: "constant", checkerboard4: "blocks", layers4: "layers" } as const)[run.pattern];
  const questionnaire = questionnaireSchema.parse({
    discretisation,
    degree: run.degree,
    meshFamily,
    size: { by: "cells", value: run.cells },
    contrast: { ratio: run.contrast, pattern },
    boundary: run.bc === "flux" ? "flux-everywhere" : "pressure-somewhere",
    hardware: { machineId, cores: run.ranks },
    tolerance: run.rtol,
  });
  return toAnswers(questionnaire, measuringMachine);
}

/**
 * What the models say about a run at the tolerance that it monitored: `atMonitored` sets the lag of the true residual to none. With a tolerance, the cost at
 * that true residual instead.
 */
export function predict({ strategy, answers, variant }: RunCase, options: { trueTolerance?: number; constants?: ModelConstants } = {}): StrategyCost {
  const asked = { ...answers, tolerance: options.trueTolerance ?? answers.tolerance };
  const sizes = computeSizes(asked);
  const kit = makeKit(asked, sizes, options.constants ?? modelConstants, variant);
  const used: CostKit = options.trueTolerance === undefined ? atMonitored(kit, asked.tolerance) : kit;
  return strategyCosts[strategy](used, { answers: asked, sizes });
}

/** The count of the run's own Krylov method at the tolerance it monitored. */
export function predictCount(runCase: RunCase, constants: ModelConstants = modelConstants): Pick<IterationCount, "expected" | "bound"> {
  const { iterations, iterationBound } = predict(runCase, { constants });
  return { expected: iterations, bound: iterationBound };
}

function atMonitored(kit: CostKit, tolerance: number): CostKit {
  return { ...kit, residualLag: (norm) => ({ ...kit.residualLag(norm), lag: 1, monitoredTolerance: tolerance }) };
}
