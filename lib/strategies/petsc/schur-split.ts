import type { OptionsContext } from "@/lib/strategies/strategy";
import { withPrefix, type OptionLine, type Section } from "./write-options-file";

const velocityJacobi: readonly OptionLine[] = [
  { name: "fieldsplit_0_ksp_type", value: "preonly", why: "Velocity: one application of the diagonal of A." },
  { name: "fieldsplit_0_pc_type", value: "jacobi", why: "diag(A)." },
];

/** Pressure block W / gamma, solved exactly. */
export const massSolve: readonly OptionLine[] = [
  { name: "fieldsplit_1_ksp_type", value: "preonly", why: "Pressure: the scaled mass matrix." },
  { name: "fieldsplit_1_pc_type", value: "bjacobi", why: "It couples unknowns of one cell only, so blocks by process are exact." },
  { name: "fieldsplit_1_sub_pc_type", value: "cholesky", why: "No fill between cells." },
];

/** Splitting found by the empty diagonal of the second block: split 0 velocity, split 1 pressure. */
const detectedSplit: readonly OptionLine[] = [
  { name: "pc_type", value: "fieldsplit", why: "Blocks for velocity and pressure." },
  {
    name: "pc_fieldsplit_detect_saddle_point",
    why: "Pressure unknowns are those with no entry on the diagonal. (Index sets given by the program take precedence: velocity first, no names.)",
  },
  { name: "pc_fieldsplit_type", value: "schur", why: "Blocks by Schur complement." },
];

/** Splitting by the index sets of the calling lines, blocks from the preconditioning matrix. */
export function suppliedSplit(blocks: string): OptionLine[] {
  return [
    { name: "pc_type", value: "fieldsplit", why: `Blocks taken from the preconditioning matrix P = ${blocks}.` },
    { name: "pc_fieldsplit_type", value: "additive", why: "Block diagonal: split 0 is velocity, split 1 pressure, as the calling lines set them." },
  ];
}

/** Block preconditioner with diag(A) and S = B diag(A)⁻¹ Bᵀ, the pressure solver given. */
export function schurSplit(prefix: string, factorisation: "diag" | "full" | "lower" | "upper", pressure: readonly OptionLine[]): Section {
  const options: OptionLine[] = [
    ...detectedSplit,
    {
      name: "pc_fieldsplit_schur_fact_type",
      value: factorisation,
      why:
        factorisation === "diag"
          ? "Block diagonal. PETSc turns the sign of the Schur complement block by itself (scale -1), so the preconditioner is positive definite as MINRES needs it."
          : "Triangular or full factorisation: not symmetric, so it goes with flexible GMRES.",
    },
    {
      name: "pc_fieldsplit_schur_precondition",
      value: "selfp",
      why: "PETSc forms -B diag(A)⁻¹ Bᵀ itself; the minus sign is that of the exact Schur complement and is dealt with by the line above.",
    },
    ...velocityJacobi,
    { name: "fieldsplit_1_ksp_type", value: "preonly", why: "Pressure: one application." },
    ...withPrefix("fieldsplit_1_", pressure),
  ];
  return { title: "Preconditioner", options: withPrefix(prefix, options) };
}

/** What the file says about the kernel. */
export function kernelNotes({ answers }: OptionsContext): string[] {
  if (answers.boundary === "pressure-somewhere") return ["A pressure boundary fixes the pressure: no null space to attach."];
  return [
    "Flux is prescribed everywhere: the kernel is (0, 1). Attach it to K by MatSetNullSpace (see the calling lines); no option can. The right-hand side's second part must sum to zero.",
  ];
}
