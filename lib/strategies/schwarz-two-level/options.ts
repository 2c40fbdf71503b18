import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { plainCallingLines } from "@/lib/strategies/petsc/calling-lines";
import { advisedOverlap, positiveParameter } from "@/lib/strategies/petsc/parameters";
import { schurFactor } from "@/lib/strategies/petsc/factor-settings";
import { symmetricKrylov } from "@/lib/strategies/petsc/residual-test";
import { kernelNotes, schurSplit } from "@/lib/strategies/petsc/schur-split";
import { shortNumber, withPrefix, writeOptionsFile, type OptionLine } from "@/lib/strategies/petsc/write-options-file";

/** MINRES with diag(A) and two-level overlapping Schwarz on B diag(A)⁻¹ Bᵀ: subdomains are processes, the coarse space aggregates. */
export function options(context: OptionsContext): OptionsFile {
  const krylov = symmetricKrylov(context);
  return writeOptionsFile({
    id: "schwarz-two-level",
    title: "two-level overlapping Schwarz on the pressure Schur complement",
    context,
    notes: [...kernelNotes(context), "One subdomain a process. Aggregates of smoothed piecewise constants make the coarse space."],
    sections: [krylov.section, schurSplit(krylov.prefix, "diag", schwarz(context))],
    callingLines: plainCallingLines(context),
  });
}

/** The same for a program that is not PETSc. */
export function recipe(context: OptionsContext): readonly string[] {
  return [
    "Take D = diag(A) and form S = B D⁻¹ Bᵀ.",
    "Cut the cells into one subdomain a process, grow each by one layer of cells, factorise S on each.",
    "Coarse space: one smoothed indicator an aggregate of cells; factorise the Galerkin coarse matrix.",
    "Apply coarse correction and subdomain solves symmetrically as the pressure block inside MINRES, diag(A) as the velocity block.",
    `Check the true relative residual against ${shortNumber(context.answers.tolerance)}.`,
  ];
}

/** Subdomains in all; without the parameter one a process. */
function blocks(context: OptionsContext): OptionLine[] {
  const subdomains = Math.round(positiveParameter(context, "subdomains", 0));
  if (subdomains === 0) return [];
  return [{ name: "mg_levels_pc_asm_blocks", value: subdomains, why: "Subdomains in all; at least one a process." }];
}

function schwarz(context: OptionsContext): OptionLine[] {
  const overlap = Math.round(positiveParameter(context, "overlap", advisedOverlap));
  return [
    { name: "pc_type", value: "gamg", why: "Supplies the aggregates and the Galerkin coarse matrix." },
    { name: "pc_mg_levels", value: 2, why: "Two levels: one coarse correction." },
    { name: "mg_levels_ksp_type", value: "chebyshev", why: "Damps the overlap without spoiling the symmetry." },
    { name: "mg_levels_ksp_max_it", value: 1, why: "One sweep before and after the coarse correction." },
    { name: "mg_levels_pc_type", value: "asm", why: "Overlapping Schwarz on the fine level." },
    { name: "mg_levels_pc_asm_type", value: "basic", why: "The symmetric variant: MINRES needs it." },
    { name: "mg_levels_pc_asm_overlap", value: overlap, why: "Layers of cells by which subdomains overlap." },
    ...blocks(context),
    ...withPrefix("mg_levels_sub_", schurFactor(context)),
    ...withPrefix("mg_coarse_", schurFactor(context)),
  ];
}
