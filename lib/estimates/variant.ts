/**
 * How a strategy's pieces are set up. The advised set-up is what the options files ask for; the others were measured among the reference runs and let the
 * models be held against them.
 */
export type Variant = {
  ordering: "nested-dissection" | "minimum-fill";
  factorisation: "ldlt" | "lu";
  /** BoomerAMG with HMIS coarsening, with its default coarsening, GAMG. */
  multigrid: "sparse" | "classical" | "aggregation";
  krylov: "minres" | "gmres" | "fgmres";
  blocks: "full" | "triangular";
};

export const advisedVariant: Variant = { ordering: "nested-dissection", factorisation: "ldlt", multigrid: "sparse", krylov: "minres", blocks: "full" };
