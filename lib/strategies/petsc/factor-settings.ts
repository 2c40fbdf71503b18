import type { OptionsContext } from "@/lib/strategies/strategy";
import {
  advisedOrdering,
  advisedSymmetricAnalysis,
  advisedWorkspacePercent,
  choiceParameter,
  orderings,
  positiveParameter,
  type Ordering,
} from "./parameters";
import type { OptionLine } from "./write-options-file";

const orderingCodes: Record<Ordering, number> = { metis: 5, pord: 4, amf: 2, scotch: 3, automatic: 7 };

/** MUMPS settings for LDLᵀ of the whole saddle-point matrix. */
export function indefiniteFactor(context: OptionsContext): OptionLine[] {
  const analysis = choiceParameter(context, "symmetricAnalysis", ["matrix", "compressed"], advisedSymmetricAnalysis(context));
  return [
    ...factor("Cholesky means LDLᵀ here: MUMPS pivots on the indefinite matrix."),
    ordering(context),
    {
      name: "mat_mumps_icntl_12",
      value: analysis === "matrix" ? 1 : 0,
      why:
        analysis === "matrix"
          ? "Analyse the matrix itself, not a graph compressed by 2x2 pivots: faster at this degree or size, and more accurate at contrast."
          : "Analyse the graph compressed by 2x2 pivots: less fill at lowest order.",
    },
    workspace(context),
    ...nullPivots(context),
  ];
}

/** MUMPS settings for the (semi)definite Schur complement approximation. */
export function schurFactor(context: OptionsContext): OptionLine[] {
  return [...factor("Exact solve with the Schur complement approximation."), ordering(context), workspace(context), ...nullPivots(context)];
}

function factor(why: string): OptionLine[] {
  return [
    { name: "pc_type", value: "cholesky", why },
    { name: "pc_factor_mat_solver_type", value: "mumps", why: "Parallel multifrontal factorisation." },
  ];
}

function ordering(context: OptionsContext): OptionLine {
  const chosen = choiceParameter(context, "ordering", orderings, advisedOrdering(context));
  const why =
    chosen === "automatic"
      ? "Ordering: 7 leaves the choice to MUMPS; on a system this small it hardly matters."
      : "Ordering: 5 is METIS, nested dissection; a MUMPS without it takes PORD. The automatic choice can be minimum fill, which cost 1.3 to 20 times more on regular meshes.";
  return { name: "mat_mumps_icntl_7", value: orderingCodes[chosen], why };
}

function workspace(context: OptionsContext): OptionLine {
  const percent = Math.round(positiveParameter(context, "workspacePercent", advisedWorkspacePercent(context)));
  return {
    name: "mat_mumps_icntl_14",
    value: percent,
    why: "Work space beyond MUMPS' own forecast, per cent: jumps in the coefficient delay pivots, and 20 then ends in INFOG(1) = -9. That is not exhausted memory: raise this number.",
  };
}

function nullPivots({ answers }: OptionsContext): OptionLine[] {
  if (answers.boundary === "pressure-somewhere") return [];
  return [{ name: "mat_mumps_icntl_24", value: 1, why: "Flux everywhere leaves the pressure free up to a constant: find that zero pivot and skip it." }];
}
