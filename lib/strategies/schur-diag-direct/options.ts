import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { schurFactor } from "@/lib/strategies/petsc/factor-settings";
import { symmetricKrylov } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, schurSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

/** MINRES with diag(A) and a factorised B diag(A)⁻¹ Bᵀ. */
export function options(context: OptionsContext): OptionsFile {
  const krylov = symmetricKrylov(context);
  return writeOptionsFile({
    id: "schur-diag-direct",
    title: "block diagonal, Schur complement approximation factorised",
    context,
    notes: kernelNotes(context),
    sections: [krylov.section, schurSplit(krylov.prefix, "diag", schurFactor(context))],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Take D = diag(A) and form S = B D⁻¹ Bᵀ: sparse, cells coupled to their neighbours.",
    context.answers.boundary === "flux-everywhere"
      ? "S has the constant in its kernel: skip one zero pivot or double one diagonal entry, and keep the iterates free of the constant."
      : "S is positive definite.",
    "Factorise S by a parallel Cholesky, ordered by nested dissection.",
    "Run MINRES on K with blockdiag(D, S), both positive (plus S, not minus).",
    `MINRES stops on the preconditioned residual: compute the true one, and start again from the iterate until it is below ${shortNumber(context.answers.tolerance)}.`,
  ];
}
