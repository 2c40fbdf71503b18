import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "direct-ldlt",
  name: "Sparse direct LDLᵀ",
  summary: "Multifrontal factorisation of the whole saddle-point matrix; one substitution a solve.",
  needs: ["parallel-direct"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "none",
  monitoredNorm: "none",
  parameters: [],
  weakSpots: [
    "Memory grows as n^(4/3) in three dimensions: it runs out before time does.",
    "Cells with many faces have wide separators: polyhedral meshes cost many times the hexahedral ones.",
    "At contrasts of 1e4 and more the pivoting needs a larger work space.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "The factorisation stops for lack of memory or work space, or the peak comes within a fifth of the machine's memory." },
  cost,
  options,
  recipe,
};
