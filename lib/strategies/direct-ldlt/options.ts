import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { indefiniteFactor } from "@/lib/strategies/petsc/factor-settings";
import { kernelNotes } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile, type OptionLine } from "@/lib/strategies/petsc/write-options-file";

/** MUMPS LDLᵀ; one factorised solve, or where round-off may show, iterative refinement with a true-residual test. */
export function options(context: OptionsContext): OptionsFile {
  return writeOptionsFile({
    id: "direct-ldlt",
    title: "sparse direct LDLT by MUMPS",
    context,
    notes: [...kernelNotes(context), "Do not call it SPD: the matrix is symmetric indefinite."],
    sections: [
      { title: "Krylov method", options: krylov(context) },
      { title: "Factorisation", options: indefiniteFactor(context) },
    ],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Assemble K = [[A, Bᵀ], [B, 0]] as one symmetric indefinite matrix; store one triangle.",
    context.answers.boundary === "flux-everywhere"
      ? "Flux everywhere: let the solver skip one zero pivot, or fix one pressure, and subtract the mean from the second right-hand side."
      : "The pressure boundary makes the matrix regular: nothing to fix.",
    "Order by nested dissection (METIS) and factorise as LDLᵀ with 2x2 pivots; avoid minimum degree orderings on regular meshes.",
    "At a contrast from 1e4 on give it twice the work space it forecasts.",
    `Check the true relative residual against ${shortNumber(context.answers.tolerance)}; one step of iterative refinement mends what pivoting left.`,
  ];
}

function krylov({ answers }: OptionsContext): OptionLine[] {
  const plain = answers.contrast.ratio <= 1e4 && answers.tolerance >= 1e-8 && answers.coefficientScale >= 1e-4 && answers.coefficientScale <= 1e4;
  if (plain) {
    return [
      { name: "ksp_type", value: "preonly", why: "One application of the factor. At this contrast the reference runs left a true residual of 1e-10 or less." },
      { name: "ksp_converged_reason", why: "Print that it ended, and how." },
    ];
  }
  return [
    {
      name: "ksp_type",
      value: "richardson",
      why: "Contrast, units or tolerance can show round-off: iterative refinement with a test on the true residual. One iteration is normal, a second costs one substitution.",
    },
    { name: "ksp_norm_type", value: "unpreconditioned", why: "The residual of the system itself." },
    { name: "ksp_rtol", value: shortNumber(answers.tolerance), why: "The tolerance asked for." },
    { name: "ksp_max_it", value: 10, why: "More iterations than this mean a bad factor: raise ICNTL(14), check the null space." },
    { name: "ksp_converged_reason", why: "Print why and after how many iterations it stopped." },
  ];
}
