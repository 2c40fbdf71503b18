import type { RuleSet } from "@/rules/rule-schema";

/** Rules about the augmented velocity block: regularised, auxiliary space, p-multigrid. */
export const augmentedRules: RuleSet = [
  {
    id: "gamma-follows-spacing-squared",
    title: "Gamma follows the square of the spacing",
    enabled: true,
    when: { fact: "available", operator: "contains", value: "augmented-assembly" },
    then: [
      { kind: "favour", strategy: "regularized-amg", factor: 1 },
      { kind: "caution", strategy: "regularized-amg", text: "Gamma stands in front of the divergence term, proportional to h² over the mean coefficient. Programs that write it as 1/gamma want the reciprocal; change it with every refinement." },
    ],
    rationale: "Augmentation helps the pressure block and hurts multigrid on the velocity block. Both are balanced where gamma is proportional to h², so that a value tuned on a coarse mesh is wrong on a fine one. The default gamma and the iteration estimate already count this.",
    source: { kind: "common-practice" },
  },
  {
    id: "plain-multigrid-misses-the-kernel",
    title: "Plain multigrid does not see the kernel of the divergence",
    enabled: true,
    when: { fact: "unknowns", operator: "greaterThan", value: 500_000 },
    then: [
      { kind: "disfavour", strategy: "regularized-amg", factor: 1 },
      { kind: "fallback", strategy: "regularized-amg", to: "schur-diag-amg", when: "iterations exceed 300, or double from one mesh to the next" },
    ],
    rationale: "Smooth coarse functions do not carry the divergence-free ones, so that counts grow as the mesh is refined even at the best gamma. The iteration estimate already counts this.",
    source: { kind: "published", citation: "Arnold, Falk & Winther, Numer. Math. 85, 2000" },
  },
  {
    id: "regularised-needs-a-sweep",
    title: "A regularised preconditioner wants a sweep of gamma first",
    enabled: true,
    when: {
      all: [
        { fact: "available", operator: "contains", value: "augmented-assembly" },
        { fact: "regularizedAmgEvidenceRuns", operator: "lessThan", value: 3 },
      ],
    },
    then: [{ kind: "disfavour", strategy: "regularized-amg", factor: 1.3 }],
    rationale: "The count rises on both sides of the best gamma, and the best one depends on the multigrid at hand. The factor stands for finding it.",
    source: { kind: "common-practice" },
  },
  {
    id: "auxiliary-space-made-for-this-block",
    title: "The auxiliary-space method is made for the augmented block",
    enabled: true,
    when: {
      all: [
        { fact: "available", operator: "contains", value: "discrete-gradient-curl" },
        { fact: "degree", operator: "equal", value: 1 },
      ],
    },
    then: [{ kind: "favour", strategy: "hdiv-auxiliary", factor: 1 }],
    rationale: "It splits off the divergence-free part with the discrete curl and treats it in nodal spaces, so that counts stay bounded under refinement. The iteration estimate already counts this.",
    source: {
      kind: "published",
      citation: "Hiptmair & Xu, SIAM J. Numer. Anal. 45(6), 2007; Arnold, Falk & Winther, Math. Comp. 66, 1997",
    },
  },
  {
    id: "auxiliary-space-beyond-lowest-order",
    title: "Beyond lowest order the auxiliary space needs its own interpolations",
    enabled: true,
    when: { fact: "degree", operator: "greaterThan", value: 1 },
    then: [
      { kind: "disfavour", strategy: "hdiv-auxiliary", factor: 2 },
      { kind: "caution", strategy: "hdiv-auxiliary", text: "The program has to supply interpolation matrices of this degree; those of the lowest order give a preconditioner that fails." },
    ],
    rationale: "Libraries build the interpolations themselves at lowest order only. The factor stands for the work of supplying them and the risk of getting one wrong.",
    source: { kind: "common-practice" },
  },
  {
    id: "auxiliary-space-open-boundary-jumps",
    title: "Open boundaries with large jumps are hard on the auxiliary space",
    enabled: true,
    when: {
      all: [
        { fact: "boundary", operator: "equal", value: "pressure-somewhere" },
        { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e5 },
      ],
    },
    then: [
      { kind: "disfavour", strategy: "hdiv-auxiliary", factor: 2 },
      { kind: "fallback", strategy: "hdiv-auxiliary", to: "hybridized-amg", when: "the residual rises or is flat in the first 50 iterations" },
    ],
    rationale: "The theory assumes a moderate coefficient, and failures have been seen where a pressure boundary meets large jumps. The factor stands for that risk.",
    source: { kind: "common-practice" },
  },
  {
    id: "p-multigrid-at-high-degree",
    title: "High degree with a hierarchy is what p-multigrid is for",
    enabled: true,
    when: {
      all: [
        { fact: "degree", operator: "greaterThanInclusive", value: 3 },
        { fact: "available", operator: "contains", value: "mesh-hierarchy" },
      ],
    },
    then: [{ kind: "favour", strategy: "p-multigrid", factor: 1 }],
    rationale: "Patch smoothers with a low-order coarse space converge at a rate that the degree does not move. The iteration estimate already counts this.",
    source: { kind: "published", citation: "Pavarino, Numer. Math. 66, 1993" },
  },
  {
    id: "p-multigrid-idle-at-lowest-order",
    title: "At lowest order there is no degree to coarsen",
    enabled: true,
    when: { fact: "degree", operator: "equal", value: 1 },
    then: [
      { kind: "disfavour", strategy: "p-multigrid", factor: 1.3 },
      { kind: "fallback", strategy: "p-multigrid", to: "schur-diag-amg", when: "the patch smoother takes more than half of the time" },
    ],
    rationale: "Patch solves are paid for without a gain over simpler smoothers. The factor stands for setting them up.",
    source: { kind: "common-practice" },
  },
  {
    id: "patches-on-polyhedra",
    title: "Patches of polyhedra are large and uneven",
    enabled: true,
    when: { fact: "meshFamily", operator: "in", value: ["voronoi", "voronoi-relaxed", "truncated-octahedra"] },
    then: [{ kind: "disfavour", strategy: "p-multigrid", factor: 1.5 }],
    rationale: "A vertex patch of polyhedra holds many faces, and polyhedral meshes rarely come as a hierarchy. The factor stands for uneven work and transfers that have to be built by agglomeration.",
    source: { kind: "common-practice" },
  },
];
