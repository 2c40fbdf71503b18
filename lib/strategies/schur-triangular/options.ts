import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { scalarMultigrid } from "@/lib/strategies/petsc/multigrid-settings";
import { choiceParameter, factorisations } from "@/lib/strategies/petsc/parameters";
import { guardedFlexible, longRecurrence, residualThreatened } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, schurSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

/** Flexible GMRES with the block factorisation made of diag(A) and one multigrid cycle on B diag(A)⁻¹ Bᵀ. */
export function options(context: OptionsContext): OptionsFile {
  const factorisation = choiceParameter(context, "factorisation", factorisations, "full");
  const krylov =
    factorisation !== "full" && residualThreatened(context) ? guardedFlexible(context) : { section: longRecurrence(context, "fgmres"), prefix: "" };
  return writeOptionsFile({
    id: "schur-triangular",
    title: "block factorisation with the Schur complement approximation",
    context,
    notes: [...kernelNotes(context), "Flexible GMRES tests the true residual: in the reference runs the full factorisation met its tolerance at every contrast and boundary; the triangular ones are guarded where that threatens."],
    sections: [krylov.section, schurSplit(krylov.prefix, factorisation, scalarMultigrid(context))],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Take D = diag(A), form S = B D⁻¹ Bᵀ and set up multigrid on S.",
    "Precondition by the block factorisation: u = D⁻¹ f; p = -S⁻¹ (g - B u); u = D⁻¹ (f - Bᵀ p).",
    "Mind the sign: the Schur complement of K is -B A⁻¹ Bᵀ.",
    "Run flexible GMRES, restart 100 or none.",
    `Stop on the true relative residual, ${shortNumber(context.answers.tolerance)}; it is what flexible GMRES monitors.`,
  ];
}
