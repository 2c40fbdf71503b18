import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { kernelLines, joinLines } from "@/lib/strategies/petsc/calling-lines";
import { advisedWorkspacePercent, positiveParameter } from "@/lib/strategies/petsc/parameters";
import { longRecurrence } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, writeOptionsFile, type OptionLine } from "@/lib/strategies/petsc/write-options-file";

/** PETSc's BDDC on the unassembled saddle-point matrix, pressures eliminated in the benign space; matrices of type IS from the calling lines. */
export function options(context: OptionsContext): OptionsFile {
  return writeOptionsFile({
    id: "bddc",
    title: "balancing domain decomposition by constraints on the saddle-point matrix",
    context,
    notes: [
      ...kernelNotes(context),
      "One subdomain a process, at least two processes; subdomains must be connected. The matrix is unassembled (MATIS): one Neumann matrix a process.",
      "Conjugate gradients would do as long as iterates stay in the benign space; flexible GMRES costs a few vectors more and tests the true residual.",
    ],
    sections: [
      longRecurrence(context, "fgmres"),
      { title: "Preconditioner", options: [...constraints, ...subdomainSolvers(context)] },
    ],
    callingLines: joinLines(given, kernelLines(context), [
      "ksp.setOperators(K)",
      "ksp.setFromOptions()",
      "ksp.getPC().setBDDCDivergenceMat(divergence, False, local_velocities)",
      "ksp.solve(b, x)",
    ]),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Cut the cells into connected subdomains, one a process, and keep the subdomain matrices unassembled.",
    "Primal constraints: the mean flux through every face shared by two subdomains; they keep the iterates divergence-free up to the coarse level.",
    "Scale by deluxe (Schur complements of the two sides) or by stiffness; plain counting fails at jumps of the coefficient.",
    "First solve for a velocity with the right divergence, then iterate in the benign space, where the operator is positive definite.",
    `Stop on the true relative residual, ${shortNumber(context.answers.tolerance)}.`,
  ];
}

const given = [
  "# Saddlemark: calling lines for petsc4py. In C: MatCreateIS, MatISSetLocalMat, PCBDDCSetDivergenceMat.",
  "# Given by the program: PETSc, numpy as np; K of type IS, velocities numbered first; n_u, n_p; b; x; ksp, not yet set up;",
  "# divergence: type IS, pressures x velocities; local_velocities: places of the local velocities in K's local numbering (sequential index set).",
];

const constraints: readonly OptionLine[] = [
  { name: "pc_type", value: "bddc", why: "Balancing domain decomposition by constraints." },
  { name: "pc_bddc_benign_trick", why: "Saddle point with discontinuous pressures: works in the space where all but one pressure a subdomain are eliminated." },
  { name: "pc_bddc_use_local_mat_graph", value: 0, why: "Group interface unknowns by the subdomains they touch. By the matrix graph every face unknown of the lowest order would be a group, and so a coarse unknown, of its own." },
  { name: "pc_bddc_use_deluxe_scaling", why: "Weights from both sides' Schur complements: what jumps of the coefficient need." },
];

/** Exact solves inside subdomains, for the Neumann problems, the deluxe Schur complements and the coarse problem. */
function subdomainSolvers(context: OptionsContext): OptionLine[] {
  const workspace = Math.round(positiveParameter(context, "workspacePercent", 2 * advisedWorkspacePercent(context)));
  const space = "Work space of that factorisation, per cent beyond the forecast.";
  const solver = (prefix: string, why: string): OptionLine[] => [
    { name: `${prefix}_pc_type`, value: "cholesky", why },
    { name: `${prefix}_pc_factor_mat_solver_type`, value: "mumps", why: "LDLᵀ: the local matrices are indefinite." },
  ];
  const singular: OptionLine[] =
    context.answers.boundary === "flux-everywhere"
      ? [{ name: "pc_bddc_coarse_mat_mumps_icntl_24", value: 1, why: "The coarse problem inherits the free constant pressure." }]
      : [];
  return [
    ...solver("pc_bddc_dirichlet", "Inside the subdomains."),
    ...solver("pc_bddc_neumann", "The constrained Neumann problems."),
    ...solver("pc_bddc_coarse", "The coarse problem."),
    { name: "pc_bddc_coarse_mat_mumps_icntl_14", value: workspace, why: space },
    ...singular,
    { name: "sub_schurs_mat_solver_type", value: "mumps", why: "The Schur complements of deluxe scaling; subdomain solves reuse their factors." },
    { name: "sub_schurs_mat_mumps_icntl_14", value: workspace, why: space },
  ];
}
