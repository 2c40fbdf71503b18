import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { scalarMultigrid } from "@/lib/strategies/petsc/multigrid-settings";
import { symmetricKrylov } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, schurSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

/** MINRES with diag(A) and one multigrid cycle on B diag(A)⁻¹ Bᵀ. */
export function options(context: OptionsContext): OptionsFile {
  const krylov = symmetricKrylov(context);
  return writeOptionsFile({
    id: "schur-diag-amg",
    title: "block diagonal, Schur complement approximation by multigrid",
    context,
    notes: kernelNotes(context),
    sections: [krylov.section, schurSplit(krylov.prefix, "diag", scalarMultigrid(context))],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Take D = diag(A) and form S = B D⁻¹ Bᵀ.",
    "Set up algebraic multigrid on S: classical coarsening where the coefficient jumps, strength threshold 0.5 in 3D, a symmetric smoother.",
    "Run MINRES on K with blockdiag(D, one V-cycle on S).",
    context.answers.boundary === "flux-everywhere" ? "Remove the constant pressure after every application." : "No null space to remove.",
    `MINRES stops on the preconditioned residual: compute the true one, and start again from the iterate until it is below ${shortNumber(context.answers.tolerance)}.`,
  ];
}
