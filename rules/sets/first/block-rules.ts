import type { RuleSet } from "@/rules/rule-schema";

/** Rules about the diagonal Schur complement and the block factorisations built from the same pieces. */
export const blockRules: RuleSet = [
  {
    id: "diagonal-schur-first-at-low-order",
    title: "At low order try the diagonal Schur complement first",
    enabled: true,
    when: {
      all: [
        { fact: "degree", operator: "lessThanInclusive", value: 1 },
        { fact: "available", operator: "contains", value: "block-splitting" },
      ],
    },
    then: [
      { kind: "favour", strategy: "schur-diag-direct", factor: 1.3 },
      { kind: "favour", strategy: "schur-diag-amg", factor: 1.3 },
    ],
    rationale:
      "The diagonal of a low-order mass block is spectrally equivalent to the block itself, with bounds that neither the mesh size nor a piecewise constant coefficient moves, as the iteration estimate knows. The factor stands for what trying it saves: short recurrences, no restart, nothing to tune.",
    source: { kind: "published", citation: "Wathen, IMA J. Numer. Anal. 7(4), 1987; Benzi, Golub & Liesen, Acta Numerica 14, 2005, section 10" },
  },
  {
    id: "diagonal-schur-fades-with-degree",
    title: "The diagonal says less about the mass block as the degree rises",
    enabled: true,
    when: { fact: "degree", operator: "greaterThanInclusive", value: 3 },
    then: [
      { kind: "disfavour", strategy: "schur-diag-direct", factor: 1 },
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1 },
      { kind: "fallback", strategy: "schur-diag-direct", to: "direct-ldlt", when: "the residual falls by less than a factor of ten over 100 iterations" },
    ],
    rationale: "The spectral interval of the diagonally scaled mass block widens with the degree, and the iterations with it. The iteration estimate already counts this.",
    source: { kind: "common-practice" },
  },
  {
    id: "extreme-cells-set-the-count",
    title: "A few extreme cells set the iteration count on random meshes",
    enabled: true,
    when: { fact: "meshFamily", operator: "in", value: ["voronoi", "distorted"] },
    then: [
      { kind: "disfavour", strategy: "schur-diag-direct", factor: 1.15 },
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1.15 },
      { kind: "caution", strategy: "schur-diag-direct", text: "Short edges and small faces widen the spectral interval as their number grows: a count from a small mesh is no guarantee here." },
      { kind: "caution", strategy: "schur-diag-amg", text: "Short edges and small faces widen the spectral interval as their number grows: a count from a small mesh is no guarantee here." },
    ],
    rationale: "The worst-shaped cell bounds the spectrum, and the more cells a random mesh has, the worse its worst one. The factor stands for the risk of a higher count than predicted.",
    source: { kind: "common-practice" },
  },
  {
    id: "diagonal-schur-hides-the-true-residual",
    title: "At high contrast the preconditioned residual flatters",
    enabled: true,
    when: { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e4 },
    then: [
      { kind: "disfavour", strategy: "schur-diag-direct", factor: 1.5 },
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1.5 },
      { kind: "caution", strategy: "schur-diag-direct", text: "MINRES stops on the preconditioned residual: check the true one, and ask for a tolerance 10 to 1000 times tighter if it lags." },
      { kind: "caution", strategy: "schur-diag-amg", text: "MINRES stops on the preconditioned residual: check the true one, and ask for a tolerance 10 to 1000 times tighter if it lags." },
    ],
    rationale: "With large coefficient jumps the preconditioned residual can meet the tolerance while the true one is orders of magnitude above it. The factor stands for the iterations until the true residual follows.",
    source: { kind: "common-practice" },
  },
  {
    id: "tighten-the-monitored-tolerance",
    title: "Ask for more in the monitored norm at high contrast",
    enabled: true,
    when: {
      all: [
        { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e4 },
        { fact: "tolerance", operator: "lessThanInclusive", value: 1e-5 },
        { fact: "tolerance", operator: "greaterThanInclusive", value: 1e-7 },
      ],
    },
    then: [
      { kind: "set", strategy: "schur-diag-direct", parameter: "monitoredTolerance", value: 1e-9 },
      { kind: "set", strategy: "schur-diag-amg", parameter: "monitoredTolerance", value: 1e-9 },
    ],
    rationale: "The preconditioned residual runs two or more digits ahead of the true one here, so that stopping at the tolerance asked for would stop too early.",
    source: { kind: "common-practice" },
  },
  {
    id: "many-cores-starve-factorised-schur",
    title: "Many cores starve a factorised inner solve",
    enabled: true,
    when: { fact: "cores", operator: "greaterThan", value: 256 },
    then: [
      { kind: "disfavour", strategy: "schur-diag-direct", factor: 1 },
      {
        kind: "fallback",
        strategy: "schur-diag-direct",
        to: "schur-diag-amg",
        when: "the triangular solves with the Schur complement take more than half of an iteration",
      },
    ],
    rationale: "Forward and back substitution run along the elimination tree and leave most cores idle near its root, once in every iteration. The solve time already counts this.",
    source: { kind: "common-practice" },
  },
  {
    id: "multigrid-schur-at-random-contrast",
    title: "Random high contrast slows multigrid on the Schur complement",
    enabled: true,
    when: {
      all: [
        { fact: "contrastPattern", operator: "equal", value: "random-field" },
        { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e4 },
      ],
    },
    then: [
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1.3 },
      { kind: "caution", strategy: "schur-diag-amg", text: "Prefer classical coarsening, with a strength threshold of 0.5 in 3D, to smoothed aggregation with default settings." },
      { kind: "fallback", strategy: "schur-diag-amg", to: "schur-diag-direct", when: "iterations exceed twice the prediction with any strength threshold" },
    ],
    rationale: "Coarsening that takes every coupling for a strong one loses the channels of a random field. The factor stands for the tuning of the strength threshold.",
    source: { kind: "common-practice" },
  },
  {
    id: "stretched-cells-want-semicoarsening",
    title: "Stretched cells and anisotropic coefficients upset multigrid",
    enabled: true,
    when: {
      any: [
        { fact: "aspectRatio", operator: "greaterThan", value: 10 },
        { fact: "anisotropy", operator: "greaterThan", value: 100 },
      ],
    },
    then: [
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1.2 },
      { kind: "disfavour", strategy: "regularized-amg", factor: 1.5 },
      { kind: "disfavour", strategy: "p-multigrid", factor: 1.5 },
      { kind: "disfavour", strategy: "hdiv-auxiliary", factor: 1.3 },
      { kind: "caution", strategy: "schur-diag-amg", text: "Strong coupling in one direction: raise the strength threshold so that coarsening follows it." },
    ],
    rationale: "Point smoothers leave errors along the weak directions. Coarsening by strength of coupling helps scalar systems, but not the vector-valued block. The factor stands for the tuning that this takes.",
    source: { kind: "common-practice" },
  },
  {
    id: "block-factorisation-sees-the-true-residual",
    title: "Flexible GMRES monitors the true residual",
    enabled: true,
    when: {
      all: [
        { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e4 },
        { fact: "schurTriangularIterations", operator: "lessThanInclusive", value: 100 },
      ],
    },
    then: [{ kind: "favour", strategy: "schur-triangular", factor: 1.2 }],
    rationale: "Right-preconditioned, it stops on the residual that counts, so that no second attempt at a tighter tolerance is needed. The factor stands for that saved attempt.",
    source: { kind: "common-practice" },
  },
  {
    id: "two-steps-with-exact-pieces",
    title: "A block triangular preconditioner ends in two steps when its pieces are exact",
    enabled: true,
    when: {
      all: [
        { fact: "available", operator: "contains", value: "block-splitting" },
        { fact: "degree", operator: "lessThanInclusive", value: 2 },
      ],
    },
    then: [{ kind: "favour", strategy: "schur-triangular", factor: 1 }],
    rationale: "The closer the Schur complement, the nearer the count comes to two, against three for the block diagonal form. The iteration estimate already counts this.",
    source: { kind: "published", citation: "Murphy, Golub & Wathen, SIAM J. Sci. Comput. 21(6), 2000" },
  },
  {
    id: "long-recurrences-cost-memory",
    title: "Flexible GMRES keeps two vectors for every iteration",
    enabled: true,
    when: { fact: "schurTriangularIterations", operator: "greaterThan", value: 100 },
    then: [
      { kind: "disfavour", strategy: "schur-triangular", factor: 1.2 },
      { kind: "caution", strategy: "schur-triangular", text: "More than 100 iterations: a restart saves memory but may stall; keep the restart as long as memory allows." },
      { kind: "fallback", strategy: "schur-triangular", to: "schur-diag-amg", when: "the residual is flat from one restart to the next" },
    ],
    rationale: "Orthogonalisation grows with the square of the iterations, and restarting gives convergence away. The factor stands for the stall after a restart.",
    source: { kind: "common-practice" },
  },
];
