import type { RuleSet } from "@/rules/rule-schema";

/** Rules about factorising the whole matrix. */
export const directRules: RuleSet = [
  {
    id: "small-high-order-goes-direct",
    title: "Small problems of high order go to the direct solver",
    enabled: true,
    when: {
      all: [
        { fact: "degree", operator: "greaterThanInclusive", value: 3 },
        { fact: "unknowns", operator: "lessThanInclusive", value: 300_000 },
      ],
    },
    then: [{ kind: "favour", strategy: "direct-ldlt", factor: 2 }],
    rationale: "High order means dense blocks, which a factorisation handles at full speed, and the factor still fits. The factor stands for the second attempt that a preconditioner of high order usually takes.",
    source: { kind: "common-practice" },
  },
  {
    id: "factorisation-reused",
    title: "One factorisation serves many solves",
    enabled: true,
    when: { fact: "repeatedSolves", operator: "greaterThanInclusive", value: 20 },
    then: [
      { kind: "favour", strategy: "direct-ldlt", factor: 1 },
      { kind: "favour", strategy: "direct-blr", factor: 1 },
      { kind: "favour", strategy: "schur-diag-direct", factor: 1 },
    ],
    rationale: "Over many solves with the same matrix the set-up is paid once and only the substitutions are repeated. The total time already counts this.",
    source: { kind: "common-practice" },
  },
  {
    id: "direct-dies-of-memory-first",
    title: "In 3D a direct solver dies of memory before it dies of time",
    enabled: true,
    when: { fact: "directLdltMemoryShare", operator: "greaterThan", value: 0.25 },
    then: [
      { kind: "disfavour", strategy: "direct-ldlt", factor: 1 },
      { kind: "caution", strategy: "direct-ldlt", text: "The factor grows like the 4/3 power of the unknowns: one refinement in 3D takes about sixteen times the memory." },
      { kind: "fallback", strategy: "direct-ldlt", to: "direct-blr", when: "the factorisation stops for memory, or its analysis announces more than the nodes have" },
    ],
    rationale: "Nested dissection of a 3D mesh fills at least like the 4/3 power of the unknowns, and no ordering does better in order. The memory estimate already counts this.",
    source: { kind: "published", citation: "George, SIAM J. Numer. Anal. 10(2), 1973; Lipton, Rose & Tarjan, SIAM J. Numer. Anal. 16(2), 1979" },
  },
  {
    id: "direct-scales-to-hundreds-of-cores",
    title: "A factorisation gains little past a thousand cores",
    enabled: true,
    when: { fact: "cores", operator: "greaterThan", value: 1024 },
    then: [
      { kind: "disfavour", strategy: "direct-ldlt", factor: 1 },
      { kind: "disfavour", strategy: "direct-blr", factor: 1.2 },
    ],
    rationale: "The analysis is largely serial and the last fronts are shared by all processes, which the time estimate counts. Compression makes the work of the processes uneven as well, and that the factor stands for.",
    source: { kind: "common-practice" },
  },
  {
    id: "low-rank-pays-on-large-fronts",
    title: "Block low-rank compression pays on large fronts",
    enabled: true,
    when: {
      all: [
        { fact: "unknowns", operator: "greaterThanInclusive", value: 1_000_000 },
        { fact: "tolerance", operator: "greaterThanInclusive", value: 1e-8 },
      ],
    },
    then: [{ kind: "favour", strategy: "direct-blr", factor: 1 }],
    rationale: "Fronts of elliptic problems have low rank off the diagonal, more so the larger they are and the looser the tolerance. Time and memory estimates already count this.",
    source: {
      kind: "published",
      citation: "Amestoy, Buttari, L'Excellent & Mary, ACM Trans. Math. Software 45(1), 2019",
    },
  },
  {
    id: "low-rank-idle-on-small-fronts",
    title: "Small fronts have nothing to compress",
    enabled: true,
    when: { fact: "unknowns", operator: "lessThan", value: 100_000 },
    then: [{ kind: "disfavour", strategy: "direct-blr", factor: 1.2 }],
    rationale: "Below the block size compression only costs time. The factor stands for the trial compressions that gain nothing.",
    source: { kind: "common-practice" },
  },
  {
    id: "tight-tolerance-against-compression",
    title: "A tight tolerance leaves compression little to drop",
    enabled: true,
    when: { fact: "tolerance", operator: "lessThan", value: 1e-10 },
    then: [
      { kind: "disfavour", strategy: "direct-blr", factor: 1.3 },
      { kind: "caution", strategy: "direct-blr", text: "Keep the compression threshold below the tolerance and allow a few steps of iterative refinement, or the residual stays above it." },
      { kind: "fallback", strategy: "direct-blr", to: "direct-ldlt", when: "iterative refinement does not reach the tolerance in ten steps" },
    ],
    rationale: "The threshold has to follow the tolerance down, ranks grow, and refinement steps come on top. The factor stands for those steps.",
    source: { kind: "common-practice" },
  },
  {
    id: "jumps-need-pivoting-room",
    title: "At lowest order large jumps need room for pivoting",
    enabled: true,
    when: {
      all: [
        { fact: "degree", operator: "equal", value: 1 },
        { fact: "contrastRatio", operator: "greaterThanInclusive", value: 1e4 },
      ],
    },
    then: [
      { kind: "caution", strategy: "direct-ldlt", text: "Delayed pivots can overrun the work space that the analysis foresaw: allow it to grow by half (ICNTL(14) in MUMPS) and try again." },
      { kind: "caution", strategy: "direct-blr", text: "Delayed pivots can overrun the work space that the analysis foresaw: allow it to grow by half (ICNTL(14) in MUMPS) and try again." },
    ],
    rationale: "The zero block and coefficients of many orders of magnitude delay pivots. A factorisation that stops with too small a work space is neither out of memory nor out of luck.",
    source: { kind: "common-practice" },
  },
  {
    id: "no-record-go-robust",
    title: "Without a record, robustness means a factorisation",
    enabled: true,
    when: {
      all: [
        { fact: "priority", operator: "equal", value: "robustness" },
        { fact: "evidenceRuns", operator: "equal", value: 0 },
        { fact: "directLdltHighMemoryShare", operator: "lessThan", value: 0.5 },
      ],
    },
    then: [{ kind: "favour", strategy: "direct-ldlt", factor: 1.3 }],
    rationale: "It has no tolerance to miss and no parameter to tune, and here it fits twice over. The factor stands for the runs that a first tuning would cost.",
    source: { kind: "common-practice" },
  },
];
