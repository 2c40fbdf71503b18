import type { OptionsContext } from "@/lib/strategies/strategy";

/** Names that every block of calling lines may use; the program defines them before. */
const given = [
  "# Saddlemark: calling lines for petsc4py. In C the same calls are MatSetNullSpace, KSPSetOperators and so on.",
  "# Given by the program: PETSc, numpy as np; K = [[A, Bt], [B, 0]] assembled, velocity unknowns first; n_u, n_p; b; x; ksp, not yet set up.",
];

/** The kernel (0, 1) of K, for flux boundaries; nothing where a pressure boundary fixes it. Assumes a basis in which the pressure 1 has all coefficients 1. */
export function kernelLines({ answers }: OptionsContext): string[] {
  if (answers.boundary === "pressure-somewhere") return [];
  return [
    "# Kernel: constant pressure (all coefficients 1; put the coefficients of the constant here if your basis differs).",
    "constant = K.createVecRight()",
    "constant.set(0.0)",
    "first, last = constant.getOwnershipRange()",
    "free = np.arange(max(first, n_u), last, dtype=PETSc.IntType)",
    "constant.setValues(free, np.full(len(free), 1.0 / np.sqrt(n_p)))",
    "constant.assemble()",
    "kernel = PETSc.NullSpace().create(vectors=[constant], comm=K.getComm())",
    "K.setNullSpace(kernel)",
    "kernel.remove(b)",
  ];
}

/** Lines for strategies whose preconditioner PETSc forms itself: operators and kernel. */
export function plainCallingLines(context: OptionsContext): string {
  return joinLines(given, kernelLines(context), [
    "K.setOption(PETSc.Mat.Option.SYMMETRIC, True)",
    "ksp.setOperators(K)",
    "ksp.setFromOptions()",
    "ksp.solve(b, x)",
  ]);
}

/**
 * Lines for strategies with a preconditioning matrix of their own, blockdiag(first_block, second_block), formed by `forming`.
 * `guarded`: the blocks belong to the inner solver of a guarded cycle. `after` follows with the splitting preconditioner as `pc`.
 */
export function blockDiagonalLines(
  context: OptionsContext,
  needs: string,
  forming: readonly string[],
  guarded: boolean,
  after: readonly string[],
): string {
  return joinLines(
    given,
    [`# Also given: ${needs}`],
    kernelLines(context),
    forming,
    [
      "P = PETSc.Mat().createNest([[first_block, None], [None, second_block]], comm=K.getComm())",
      'P = P.convert("aij")',
      "K.setOption(PETSc.Mat.Option.SYMMETRIC, True)",
      "ksp.setOperators(K, P)",
      "ksp.setFromOptions()",
      "pc = ksp.getPC()",
    ],
    guarded ? ["inner = pc.getKSP()", "inner.setOperators(K, P)", "inner.setFromOptions()", "pc = inner.getPC()"] : [],
    [
      "start, end = K.getOwnershipRange()",
      "velocities = PETSc.IS().createStride(max(0, min(end, n_u) - start), first=start, step=1, comm=K.getComm())",
      "pressures = PETSc.IS().createStride(max(0, end - max(start, n_u)), first=max(start, n_u), step=1, comm=K.getComm())",
      'pc.setFieldSplitIS(("0", velocities), ("1", pressures))',
    ],
    after,
    ["ksp.solve(b, x)"],
  );
}

/** Lines that augment A by gamma Bᵀ W⁻¹ B. W must be diagonal, or its inverse given as W_inverse. */
export function augmentLines(gamma: string): string[] {
  return [
    `gamma = ${gamma}`,
    "if W_inverse is None:",
    "    diagonal = W.getDiagonal()",
    "    diagonal.reciprocal()",
    "    W_inverse = W.duplicate()",
    "    W_inverse.setDiagonal(diagonal)",
    "scaled = W_inverse.matMult(B)",
    "first_block = B.transposeMatMult(scaled)",
    "first_block.scale(gamma)",
    "first_block.axpy(1.0, A, structure=PETSc.Mat.Structure.DIFFERENT_NONZERO_PATTERN)",
    "first_block.setOption(PETSc.Mat.Option.SPD, True)",
    "second_block = W.copy()",
    "second_block.scale(1.0 / gamma)",
  ];
}

export function joinLines(...groups: readonly (readonly string[])[]): string {
  return groups.flat().join("\n") + "\n";
}
