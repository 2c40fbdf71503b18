import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { augmentLines, blockDiagonalLines } from "@/lib/strategies/petsc/calling-lines";
import { schurFactor } from "@/lib/strategies/petsc/factor-settings";
import { gammaOf } from "@/lib/strategies/petsc/parameters";
import { longRecurrence } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, massSolve, suppliedSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, withPrefix, writeOptionsFile, type OptionLine } from "@/lib/strategies/petsc/write-options-file";

/** Flexible GMRES with p-multigrid on A + gamma Bᵀ W⁻¹ B: patch smoother at the degree, one correction at degree 1; interpolation and patches supplied. */
export function options(context: OptionsContext): OptionsFile {
  if (context.answers.degree === 1) {
    return { kind: "recipe-only", reason: "At degree 1 there is no coarser degree: the levels are meshes, whose number and interpolations only the program's hierarchy knows." };
  }
  const gamma = shortNumber(gammaOf(context));
  return writeOptionsFile({
    id: "p-multigrid",
    title: "augmented block diagonal, p-multigrid with patch smoother",
    context,
    notes: [...kernelNotes(context), `gamma = ${gamma} = c h^2 / nu_ref in A + gamma BT W^-1 B and W / gamma, W the unweighted pressure mass matrix.`],
    sections: [
      longRecurrence(context, "fgmres"),
      {
        title: "Preconditioner",
        options: [
          ...suppliedSplit("blockdiag(A + gamma BT W^-1 B, W / gamma)"),
          { name: "fieldsplit_0_ksp_type", value: "preonly", why: "Velocity: one cycle." },
          ...withPrefix("fieldsplit_0_", cycle(context)),
          ...massSolve,
        ],
      },
    ],
    callingLines: blockDiagonalLines(
      context,
      "A, B, W, W_inverse; interpolation (velocities at the degree x velocities at degree 1); patches: index sets of the velocities inside the star of each vertex.",
      augmentLines(gamma),
      false,
      patchLines,
    ),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    `Set gamma = ${shortNumber(gammaOf(context))} (c h² / ν) and assemble A + gamma Bᵀ W⁻¹ B at the degree asked for.`,
    "Smooth by exact solves on the stars of the vertices: all velocities whose support lies in the cells around one vertex. Point smoothers fail on the kernel of the divergence.",
    context.answers.degree > 1 ? "Correct at degree 1 through the embedding of the lower degree; solve there directly or by the auxiliary-space method." : "Correct on the next coarser mesh, down to one that is factorised.",
    "Second block: W / gamma, cell by cell. Outer method: flexible GMRES.",
    `Stop on the true relative residual, ${shortNumber(context.answers.tolerance)}.`,
  ];
}

function cycle(context: OptionsContext): OptionLine[] {
  return [
    { name: "pc_type", value: "mg", why: "Multigrid with levels from the program." },
    { name: "pc_mg_levels", value: 2, why: "The degree asked for, and degree 1." },
    { name: "pc_mg_galerkin", value: "both", why: "Coarse matrix by the embedding." },
    { name: "mg_levels_ksp_type", value: "chebyshev", why: "Damps overlapping patches; symmetric." },
    { name: "mg_levels_ksp_max_it", value: 2, why: "Sweeps each way." },
    { name: "mg_levels_pc_type", value: "asm", why: "Additive patches, the index sets of the calling lines." },
    { name: "mg_levels_pc_asm_type", value: "basic", why: "The symmetric variant." },
    { name: "mg_levels_pc_asm_overlap", value: 0, why: "The patches overlap already." },
    { name: "mg_levels_sub_pc_type", value: "cholesky", why: "Exact on a patch." },
    ...withPrefix("mg_coarse_", schurFactor({ ...context, answers: { ...context.answers, boundary: "pressure-somewhere" } })),
  ];
}

const patchLines = [
  "pc.setOperators(K, P)",
  "pc.setUp()",
  "velocity = pc.getFieldSplitSubKSP()[0].getPC()",
  "velocity.setMGInterpolation(1, interpolation)",
  "smoother = velocity.getMGSmoother(1).getPC()",
  'smoother.setType("asm")',
  "smoother.setASMLocalSubdomains(len(patches), patches)",
] as const;
