import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { indefiniteFactor } from "@/lib/strategies/petsc/factor-settings";
import { advisedBlrTolerance, positiveParameter } from "@/lib/strategies/petsc/parameters";
import { kernelNotes } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile } from "@/lib/strategies/petsc/write-options-file";

const iterationCeiling = 60;

/** MUMPS with block low-rank fronts, the approximate factor inside GMRES from the right. */
export function options(context: OptionsContext): OptionsFile {
  const dropping = positiveParameter(context, "blrTolerance", advisedBlrTolerance(context));
  return writeOptionsFile({
    id: "direct-blr",
    title: "sparse direct with block low-rank fronts by MUMPS",
    context,
    notes: kernelNotes(context),
    sections: [
      {
        title: "Krylov method",
        options: [
          { name: "ksp_type", value: "gmres", why: "The compressed factor is a strong preconditioner, no exact inverse." },
          { name: "ksp_pc_side", value: "right", why: "From the right, GMRES sees the true residual." },
          { name: "ksp_norm_type", value: "unpreconditioned", why: "Stop on the residual of the system itself." },
          { name: "ksp_rtol", value: shortNumber(context.answers.tolerance), why: "The tolerance asked for." },
          { name: "ksp_gmres_restart", value: iterationCeiling, why: "No restart before the limit." },
          { name: "ksp_max_it", value: iterationCeiling, why: "More than this: the compression is too coarse, lower CNTL(7)." },
          { name: "ksp_converged_reason", why: "Print why and after how many iterations it stopped." },
        ],
      },
      {
        title: "Factorisation",
        options: [
          ...indefiniteFactor(context),
          { name: "mat_mumps_icntl_35", value: 2, why: "Block low-rank compression in factorisation and solve." },
          { name: "mat_mumps_icntl_36", value: 1, why: "Compress as early as possible: fewer operations." },
          { name: "mat_mumps_cntl_7", value: shortNumber(dropping), why: "What is dropped from a block: the memory it saves is paid in iterations." },
        ],
      },
    ],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Assemble K = [[A, Bᵀ], [B, 0]] as one symmetric indefinite matrix and order it by nested dissection.",
    `Factorise as LDLᵀ with block low-rank fronts, dropping tolerance ${shortNumber(positiveParameter(context, "blrTolerance", advisedBlrTolerance(context)))}.`,
    "Use the factor as a right preconditioner of GMRES without restart.",
    `Stop on the true relative residual, ${shortNumber(context.answers.tolerance)}.`,
    "Past 60 iterations lower the dropping tolerance by a hundred.",
  ];
}
