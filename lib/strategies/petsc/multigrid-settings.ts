import type { OptionsContext } from "@/lib/strategies/strategy";
import { advisedAmgPackage, advisedStrongThreshold, amgPackages, choiceParameter, positiveParameter } from "./parameters";
import { shortNumber, type OptionLine } from "./write-options-file";

/** One symmetric V-cycle of algebraic multigrid for a scalar elliptic operator in 3D. */
export function scalarMultigrid(context: OptionsContext): OptionLine[] {
  return choiceParameter(context, "amgPackage", amgPackages, advisedAmgPackage) === "gamg" ? aggregation() : boomer(context);
}

/** One V-cycle for the augmented velocity block: default interpolation, which stood the reference sweeps. */
export function velocityMultigrid(context: OptionsContext): OptionLine[] {
  if (choiceParameter(context, "amgPackage", amgPackages, "gamg") === "gamg") return aggregation();
  return [
    { name: "pc_type", value: "hypre", why: "Algebraic multigrid of hypre." },
    { name: "pc_hypre_type", value: "boomeramg", why: "Classical coarsening; one V-cycle, symmetric as MINRES needs it." },
  ];
}

function boomer(context: OptionsContext): OptionLine[] {
  const threshold = positiveParameter(context, "strongThreshold", advisedStrongThreshold);
  return [
    { name: "pc_type", value: "hypre", why: "Algebraic multigrid of hypre." },
    { name: "pc_hypre_type", value: "boomeramg", why: "Classical coarsening; one V-cycle, symmetric as MINRES needs it." },
    { name: "pc_hypre_boomeramg_strong_threshold", value: shortNumber(threshold), why: "What counts as a strong coupling; 0.5 suits 3D." },
    { name: "pc_hypre_boomeramg_coarsen_type", value: "HMIS", why: "Sparse coarsening: keeps the operator complexity low in 3D." },
    { name: "pc_hypre_boomeramg_interp_type", value: "ext+i", why: "Long-range interpolation that goes with it." },
    { name: "pc_hypre_boomeramg_P_max", value: 4, why: "At most four coarse points in an interpolation row: bounds memory." },
  ];
}

function aggregation(): OptionLine[] {
  return [
    { name: "pc_type", value: "gamg", why: "PETSc's aggregation multigrid, one V-cycle." },
    { name: "mg_levels_ksp_max_it", value: 2, why: "Two Chebyshev steps each way: a fixed polynomial, so the cycle stays symmetric." },
  ];
}
