import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { joinLines } from "@/lib/strategies/petsc/calling-lines";
import { scalarMultigrid } from "@/lib/strategies/petsc/multigrid-settings";
import { iterationLimit } from "@/lib/strategies/petsc/residual-test";
import { shortNumber, writeOptionsFile, type OptionLine } from "@/lib/strategies/petsc/write-options-file";

const cycles = 8;

/** Conjugate gradients with multigrid on the hybridised system, repeated on the residual of K until that is small. */
export function options(context: OptionsContext): OptionsFile {
  const { answers } = context;
  return writeOptionsFile({
    id: "hybridized-amg",
    title: "hybridised to face multipliers, conjugate gradients with multigrid",
    context,
    notes: [
      "The options are for the symmetric positive (semi)definite system H of the face multipliers, which the program condenses cell by cell.",
      ...(answers.boundary === "flux-everywhere" ? ["Flux is prescribed everywhere: H is singular by the constant multiplier; the calling lines attach it."] : []),
    ],
    sections: [
      { title: "Krylov method", options: krylov(context) },
      { title: "Preconditioner", options: scalarMultigrid(context) },
    ],
    callingLines: callingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Give every cell its own copy of its face velocities and tie the copies by one multiplier per face unknown.",
    "Eliminate velocity and pressure cell by cell: H = sum over cells of Cᵀ (M⁻¹)ᵤᵤ C, symmetric positive definite, one unknown a face at lowest order.",
    "Solve H by conjugate gradients with algebraic multigrid: five to ten iterations were measured at every size and contrast at lowest order.",
    "Recover velocity and pressure cell by cell.",
    `Compute the residual of the saddle-point system; while above ${shortNumber(context.answers.tolerance)} solve again for what is left.`,
  ];
}

function krylov(context: OptionsContext): OptionLine[] {
  const tolerance = Math.max(1e-12, context.answers.tolerance / 10);
  return [
    { name: "ksp_type", value: "cg", why: "H is symmetric positive definite." },
    { name: "ksp_norm_type", value: "unpreconditioned", why: "Stop on the residual of H itself." },
    {
      name: "ksp_rtol",
      value: shortNumber(tolerance),
      why: "A decade below the tolerance asked for: the residual of the saddle-point system lags that of H. The calling lines test it and repeat.",
    },
    { name: "ksp_max_it", value: iterationLimit(context, Math.log(tolerance) / Math.log(context.answers.tolerance)), why: "Twice the high end of the estimate." },
    { name: "ksp_converged_reason", why: "Print why and after how many iterations it stopped." },
  ];
}

function callingLines({ answers }: OptionsContext): string {
  const singular = answers.boundary === "flux-everywhere";
  return joinLines(
    [
      "# Saddlemark: calling lines for petsc4py.",
      "# Given by the program: PETSc; H, the multiplier matrix; K; b; x; ksp, not yet set up; condense(r): right-hand side of H for the residual r of K;",
      "# recover(multipliers, r): velocity and pressure by cells.",
    ],
    singular
      ? [
          "# multiplier_kernel: coefficients of the constant pressure on the faces (all 1 at lowest order).",
          "multiplier_kernel.normalize()",
          "H.setNullSpace(PETSc.NullSpace().create(vectors=[multiplier_kernel], comm=H.getComm()))",
        ]
      : [],
    [
      "H.setOption(PETSc.Mat.Option.SPD, True)",
      "ksp.setOperators(H)",
      "ksp.setFromOptions()",
      "multipliers = H.createVecRight()",
      "residual = b.copy()",
      "x.set(0.0)",
      `for cycle in range(${cycles}):`,
      "    ksp.solve(condense(residual), multipliers)",
      "    x.axpy(1.0, recover(multipliers, residual))",
      "    K.mult(x, residual)",
      "    residual.aypx(-1.0, b)",
      `    if residual.norm() <= ${shortNumber(answers.tolerance)} * b.norm():`,
      "        break",
    ],
  );
}
