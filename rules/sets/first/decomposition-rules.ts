import type { RuleSet } from "@/rules/rule-schema";

/** Rules about hybridisation, domain decomposition, scaling and the null space. */
export const decompositionRules: RuleSet = [
  {
    id: "pressure-null-space-told",
    title: "With flux prescribed everywhere the pressure is known up to a constant",
    enabled: true,
    when: { fact: "boundary", operator: "equal", value: "flux-everywhere" },
    then: [
      {
        kind: "caution",
        strategy: null,
        text: "The pressure is known up to a constant: tell the solver the null space (0, 1) and make the right-hand side consistent, or pin one pressure for a direct solver.",
      },
    ],
    rationale: "A singular system without its null space stalls a Krylov method near the tolerance and gives a factorisation a zero pivot.",
    source: { kind: "published", citation: "Bochev & Lehoucq, SIAM Review 47(1), 2005" },
  },
  {
    id: "no-decomposition-without-subdomains",
    title: "No domain decomposition without unassembled matrices",
    enabled: true,
    when: { fact: "available", operator: "doesNotContain", value: "unassembled-subdomains" },
    then: [
      { kind: "exclude", strategy: "bddc", reason: "Each subdomain's own matrix is needed before assembly; it can't be taken out of the assembled one." },
      { kind: "exclude", strategy: "schwarz-two-level", reason: "A coarse space that holds against jumps is built from each subdomain's own matrix before assembly." },
    ],
    rationale: "Neumann problems on subdomains are lost in assembly, and with them the constraints and coarse spaces that make these methods scale.",
    source: { kind: "published", citation: "Toselli & Widlund, Domain Decomposition Methods, Springer 2005" },
  },
  {
    id: "jumps-speak-for-deluxe-bddc",
    title: "Large jumps speak against plain Schwarz and for BDDC with deluxe or stiffness scaling",
    enabled: true,
    when: { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e3 },
    then: [
      { kind: "disfavour", strategy: "schwarz-two-level", factor: 1.5 },
      { kind: "favour", strategy: "bddc", factor: 1.2 },
      { kind: "caution", strategy: "bddc", text: "Scale the interface by deluxe weights or by the stiffness; counting weights lose the bound when the coefficient jumps across subdomains." },
      { kind: "fallback", strategy: "schwarz-two-level", to: "bddc", when: "iterations grow with the contrast" },
    ],
    rationale: "The bound of plain overlapping Schwarz grows with jumps inside the overlap, while weighted averages with adaptive constraints keep that of BDDC. The factors stand for patterns that are worse, or better, than the mild growth with contrast that the model assumes.",
    source: { kind: "published", citation: "Oh, Widlund, Zampini & Dohrmann, Math. Comp. 87, 2018" },
  },
  {
    id: "bddc-bound-is-polylogarithmic",
    title: "BDDC's condition number grows with the logarithm of the subdomain size only",
    enabled: true,
    when: {
      all: [
        { fact: "available", operator: "contains", value: "unassembled-subdomains" },
        { fact: "cores", operator: "greaterThanInclusive", value: 64 },
      ],
    },
    then: [{ kind: "favour", strategy: "bddc", factor: 1 }],
    rationale: "It is at most C (1 + log(H/h))², whatever the number of subdomains, and its dual has the same spectrum but for zeros and ones. The iteration estimate already counts this.",
    source: { kind: "published", citation: "Mandel, Dohrmann & Tezaur, Appl. Numer. Math. 54, 2005" },
  },
  {
    id: "bddc-few-subdomains",
    title: "A handful of subdomains makes BDDC a slow direct solver",
    enabled: true,
    when: { fact: "cores", operator: "lessThan", value: 16 },
    then: [
      { kind: "disfavour", strategy: "bddc", factor: 1 },
      { kind: "disfavour", strategy: "schwarz-two-level", factor: 1 },
      { kind: "fallback", strategy: "bddc", to: "direct-ldlt", when: "subdomain factorisations take more than half of the time" },
    ],
    rationale: "Large subdomains cost nearly a whole factorisation each. The set-up estimate already counts this.",
    source: { kind: "common-practice" },
  },
  {
    id: "coarse-problem-of-many-subdomains",
    title: "Thousands of subdomains make the coarse problem the bottleneck",
    enabled: true,
    when: { fact: "cores", operator: "greaterThan", value: 4096 },
    then: [
      { kind: "disfavour", strategy: "bddc", factor: 1 },
      { kind: "disfavour", strategy: "schwarz-two-level", factor: 1 },
      { kind: "caution", strategy: "bddc", text: "Solve the coarse problem on a subset of the processes, or by a second level of BDDC." },
    ],
    rationale: "The coarse problem grows with the number of subdomains and is solved in every iteration. The estimate already counts this.",
    source: { kind: "common-practice" },
  },
  {
    id: "schwarz-wants-a-spectral-coarse-space",
    title: "Overlapping Schwarz wants a spectral coarse space",
    enabled: true,
    when: {
      all: [
        { fact: "available", operator: "contains", value: "unassembled-subdomains" },
        { any: [{ fact: "contrastRatio", operator: "greaterThan", value: 100 }, { fact: "cores", operator: "greaterThan", value: 64 }] },
      ],
    },
    then: [
      { kind: "caution", strategy: "schwarz-two-level", text: "Choose the coarse space by local eigenproblems in the overlaps; piecewise constants hold for few subdomains and mild coefficients only." },
    ],
    rationale: "Without a coarse space counts grow with the number of subdomains, and with constants alone they grow with the contrast.",
    source: { kind: "published", citation: "Spillane, Dolean, Hauret, Nataf, Pechstein & Scheichl, Numer. Math. 126, 2014" },
  },
  {
    id: "hybridisation-gives-a-definite-system",
    title: "Hybridisation trades the saddle point for a definite system on the faces",
    enabled: true,
    when: { fact: "available", operator: "contains", value: "hybridised-assembly" },
    then: [{ kind: "favour", strategy: "hybridized-amg", factor: 1 }],
    rationale: "Static condensation leaves a symmetric positive definite system for the face multipliers, smaller than the original and within reach of plain multigrid. The estimate already counts this.",
    source: { kind: "published", citation: "Arnold & Brezzi, RAIRO Modél. Math. Anal. Numér. 19(1), 1985" },
  },
  {
    id: "multipliers-of-high-degree",
    title: "Multigrid struggles with multipliers of high degree",
    enabled: true,
    when: { fact: "degree", operator: "greaterThanInclusive", value: 4 },
    then: [
      { kind: "disfavour", strategy: "hybridized-amg", factor: 1.3 },
      { kind: "fallback", strategy: "hybridized-amg", to: "direct-ldlt", when: "iterations exceed 100" },
    ],
    rationale: "Algebraic coarsening does not know which multipliers belong to one face. The factor stands for the block smoothers and scaling of the basis that it then takes.",
    source: { kind: "common-practice" },
  },
  {
    id: "too-few-unknowns-per-core",
    title: "Too few unknowns per core",
    enabled: true,
    when: {
      all: [
        { fact: "unknownsPerCore", operator: "lessThan", value: 5000 },
        { fact: "cores", operator: "greaterThan", value: 32 },
      ],
    },
    then: [
      { kind: "disfavour", strategy: "schur-diag-amg", factor: 1 },
      { kind: "disfavour", strategy: "regularized-amg", factor: 1 },
      { kind: "disfavour", strategy: "hybridized-amg", factor: 1 },
      { kind: "disfavour", strategy: "hdiv-auxiliary", factor: 1 },
      { kind: "caution", strategy: null, text: "Fewer than 5 000 unknowns per core: messages outweigh arithmetic, and fewer cores may be faster." },
    ],
    rationale: "Coarse levels of multigrid have less than one unknown per core and cost latency only. The solve time already counts this.",
    source: { kind: "common-practice" },
  },
];
