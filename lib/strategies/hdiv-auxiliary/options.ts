import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { augmentLines, blockDiagonalLines } from "@/lib/strategies/petsc/calling-lines";
import { symmetricKrylov } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, suppliedSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, withPrefix, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

/** MINRES with hypre's ADS on A + Bᵀ W⁻¹ B / nu_ref; discrete gradient, curl and coordinates supplied by the calling lines. */
export function options(context: OptionsContext): OptionsFile {
  if (context.answers.degree > 1) {
    return { kind: "recipe-only", reason: "Above the lowest order the auxiliary spaces need interpolations that the program has to supply; no option or standard matrix gives them." };
  }
  const krylov = symmetricKrylov(context, true);
  return writeOptionsFile({
    id: "hdiv-auxiliary",
    title: "block diagonal, auxiliary-space multigrid of hypre (ADS)",
    context,
    notes: kernelNotes(context),
    sections: [
      krylov.section,
      {
        title: "Preconditioner",
        options: withPrefix(krylov.prefix, [
          ...suppliedSplit("blockdiag(A + weight BT W^-1 B, W / weight)"),
          { name: "fieldsplit_0_ksp_type", value: "preonly", why: "Velocity: one cycle." },
          { name: "fieldsplit_0_pc_type", value: "hypre", why: "hypre's multigrid." },
          { name: "fieldsplit_0_pc_hypre_type", value: "ads", why: "Auxiliary-space divergence solver: sees the kernel of the divergence through the curl." },
          { name: "fieldsplit_1_ksp_type", value: "preonly", why: "Pressure: mass matrix." },
          { name: "fieldsplit_1_pc_type", value: "jacobi", why: "Diagonal at lowest order." },
        ]),
      },
    ],
    callingLines: blockDiagonalLines(
      context,
      "A, B, W (diagonal), W_inverse = None; gradient (edges x vertices), curl (faces x edges), coordinates (vertices x 3), on the faces that are unknowns.",
      augmentLines(shortNumber(1 / context.answers.coefficientScale)),
      krylov.prefix !== "",
      auxiliaryLines,
    ),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Assemble A + Bᵀ W⁻¹ B, W the pressure mass matrix (weight 1 / ν where the coefficient's mean is not 1).",
    "Form the discrete gradient (vertices to edges) and the discrete curl (edges to faces): entries 1 and -1 by orientation at lowest order.",
    context.answers.degree > 1 ? "Above the lowest order supply the interpolations into face and edge elements of the degree as well." : "Pass the vertex coordinates.",
    "One cycle of the auxiliary-space method on the first block, W on the second, inside MINRES.",
    `Check the true relative residual against ${shortNumber(context.answers.tolerance)}: it lags by up to a thousand here.`,
  ];
}

const auxiliaryLines = [
  "pc.setOperators(K, P)",
  "pc.setUp()",
  "velocity = pc.getFieldSplitSubKSP()[0].getPC()",
  "velocity.setHYPREDiscreteGradient(gradient)",
  "velocity.setHYPREDiscreteCurl(curl)",
  "velocity.setCoordinates(coordinates)",
] as const;
