import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { augmentLines, blockDiagonalLines } from "@/lib/strategies/petsc/calling-lines";
import { velocityMultigrid } from "@/lib/strategies/petsc/multigrid-settings";
import { gammaOf } from "@/lib/strategies/petsc/parameters";
import { symmetricKrylov } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, massSolve, suppliedSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, withPrefix, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

/** MINRES with multigrid on A + gamma Bᵀ W⁻¹ B and W / gamma, both supplied by the calling lines. */
export function options(context: OptionsContext): OptionsFile {
  const krylov = symmetricKrylov(context, true);
  const gamma = shortNumber(gammaOf(context));
  return writeOptionsFile({
    id: "regularized-amg",
    title: "augmented block diagonal, multigrid on the velocity block",
    context,
    notes: [
      ...kernelNotes(context),
      `gamma = ${gamma} = c h^2 / nu_ref in A + gamma BT W^-1 B and W / gamma, W the unweighted pressure mass matrix. It goes into the matrices, not into an option. Halve h and gamma falls to a quarter.`,
    ],
    sections: [
      krylov.section,
      {
        title: "Preconditioner",
        options: withPrefix(krylov.prefix, [
          ...suppliedSplit("blockdiag(A + gamma BT W^-1 B, W / gamma)"),
          { name: "fieldsplit_0_ksp_type", value: "preonly", why: "Velocity: one multigrid cycle." },
          ...withPrefix("fieldsplit_0_", velocityMultigrid(context)),
          ...massSolve,
        ]),
      },
    ],
    callingLines: blockDiagonalLines(
      context,
      "A, B, W (pressure mass matrix); W_inverse, or None where W is diagonal.",
      augmentLines(gamma),
      krylov.prefix !== "",
      [],
    ),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    `Set gamma = ${shortNumber(gammaOf(context))} (c h² / ν) and assemble A + gamma Bᵀ W⁻¹ B with W the unweighted pressure mass matrix: element by element, it is a divergence-divergence term.`,
    "Set up algebraic multigrid on it, one symmetric V-cycle.",
    "Second block: W / gamma, solved exactly cell by cell.",
    "Run MINRES on the unaugmented K with this block diagonal.",
    `Check the true relative residual against ${shortNumber(context.answers.tolerance)}: with gamma far too large MINRES reports convergence on a wrong answer.`,
  ];
}
