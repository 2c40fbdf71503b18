/** How grave a finding is: `failure` explains why a run is no success, `waste` costs time, `risk` may cost the next run. */
export const findingSeverities = ["failure", "waste", "risk", "note"] as const;
export type FindingSeverity = (typeof findingSeverities)[number];

export type FindingSource = { kind: "published" | "common-practice" | "measured"; citation: string };

/** Numbers a finding rests on, by name with the unit in it; words for names of options and the like. */
export type Evidence = Record<string, number | string>;

type FindingDefinition = {
  title: string;
  severity: FindingSeverity;
  /** What was seen, in one sentence, from the evidence. */
  text: (evidence: Evidence) => string;
  /** What to try next, and why it may help. */
  whatToTry: string;
  source: FindingSource;
};

function show(value: number | string | undefined): string {
  if (value === undefined) return "unknown";
  if (typeof value === "string") return value;
  const size = Math.abs(value);
  if (Number.isInteger(value) && size < 1e6) return String(value);
  return size !== 0 && (size < 1e-2 || size >= 1e5) ? value.toExponential(1) : String(Number(value.toPrecision(3)));
}

function percent(value: number | string | undefined): string {
  return typeof value === "number" ? `${Math.round(100 * value)} %` : "unknown";
}

const convergenceSurvey = "M. Benzi, G. H. Golub, J. Liesen, Acta Numerica 14 (2005)";
const referenceRuns = "The reference runs that ship with Saddlemark (PETSc 3.18.5, MUMPS 5.5.1)";

/** Everything the diagnosis can find. Adding a finding = adding an entry here and its test in `tests`. */
export const findings = {
  stagnation: {
    title: "The residual stands still",
    severity: "failure",
    text: (e) => `From iteration ${show(e["fromIteration"])} on the residual changes by ${show(e["decadesPerIteration"])} decimal digits an iteration: one digit takes ${show(e["iterationsPerDecade"])} iterations.`,
    whatToTry: "Strengthen the preconditioner before raising the iteration limit: an exact inner solve in place of multigrid, an augmentation parameter nearer to its optimum, or a direct solver if it fits. If the level is near round-off, loosen the tolerance.",
    source: { kind: "published", citation: `A. Greenbaum, Iterative Methods for Solving Linear Systems, SIAM (1997), ch. 3; ${convergenceSurvey}` },
  },
  divergence: {
    title: "The residual grows",
    severity: "failure",
    text: (e) => `The residual ended ${show(e["growth"])} times above where it started${e["reason"] === undefined ? "" : ` (${e["reason"]})`}.`,
    whatToTry: "Check that the method fits the system: conjugate gradients need a definite matrix, MINRES a symmetric definite preconditioner. Use flexible GMRES where the preconditioner contains an iteration.",
    source: { kind: "published", citation: `Y. Saad, Iterative Methods for Sparse Linear Systems, 2nd ed., SIAM (2003), ch. 6 and 9; ${convergenceSurvey}` },
  },
  "indefinite-system": {
    title: "The method needs a definite matrix",
    severity: "failure",
    text: (e) => `The solver stopped with ${show(e["reason"])}: a saddle-point matrix has eigenvalues of both signs.`,
    whatToTry: "Use MINRES with a symmetric positive definite block preconditioner, or GMRES; conjugate gradients only on the hybridised or the Schur complement system.",
    source: { kind: "published", citation: convergenceSurvey },
  },
  "restart-effect": {
    title: "Restarts throw away progress",
    severity: "waste",
    text: (e) => `Behind ${show(e["stalledRestarts"])} of ${show(e["restarts"])} restarts (every ${show(e["restart"])} iterations) the residual falls at ${percent(e["rateRatio"])} of the rate before them.`,
    whatToTry: "Raise the restart length as far as memory allows (one vector an iteration), or use MINRES with a symmetric preconditioner: it needs no restarts.",
    source: { kind: "published", citation: "Y. Saad, M. H. Schultz, SIAM J. Sci. Stat. Comput. 7(3) (1986); Y. Saad, Iterative Methods for Sparse Linear Systems, SIAM (2003), sec. 6.5.5" },
  },
  "true-residual-not-met": {
    title: "The preconditioned residual is met, the true one is not",
    severity: "failure",
    text: (e) => `The solver stopped content, but the true relative residual is ${show(e["trueRelativeResidual"])}, ${show(e["factor"])} times the tolerance of ${show(e["tolerance"])}.`,
    whatToTry: "Test the true residual (right preconditioning with GMRES or FGMRES), or tighten the tolerance by that factor. With the diagonal Schur preconditioner and high contrast this gap is usual.",
    source: { kind: "measured", citation: `${referenceRuns}: at 1e-8 up to 1e-2 in the true residual for left GMRES` },
  },
  "setup-dominates": {
    title: "Most of the time goes into the set-up",
    severity: "waste",
    text: (e) => `The set-up takes ${show(e["setupSeconds"])} s of ${show(e["totalSeconds"])} s (${percent(e["share"])}) for ${show(e["repeatedSolves"])} solves.`,
    whatToTry: "Keep the factorisation or the hierarchy for all right-hand sides and time steps with the same matrix; compare another ordering (PORD, or ICNTL(12) = 1 for symmetric indefinite systems) or a strategy without a factorisation.",
    source: { kind: "measured", citation: `${referenceRuns}: tuned orderings 2 to 3 times faster in many cases` },
  },
  "poor-parallel-efficiency": {
    title: "More processes help little",
    severity: "waste",
    text: (e) => `On ${show(e["processes"])} processes the solve is ${show(e["speedup"])} times as fast as on ${show(e["baseProcesses"])}: ${percent(e["efficiency"])} of the ideal.`,
    whatToTry: "Give each process more unknowns (some tens of thousands), pin processes to cores and spread them over memory channels. Sparse solves are limited by memory bandwidth, which extra cores of one socket do not add.",
    source: { kind: "common-practice", citation: "Common practice, no source" },
  },
  "memory-near-limit": {
    title: "Memory is nearly used up",
    severity: "risk",
    text: (e) => `The run used ${show(e["peakMemoryGiB"])} GiB of ${show(e["limitGiB"])} GiB (${percent(e["share"])}).`,
    whatToTry: "Use more nodes or a strategy that needs less: block preconditioners grow with the unknowns, a factorisation faster. A slightly larger system, or delayed pivots, would not fit.",
    source: { kind: "published", citation: "Factor entries grow as n^(4/3): R. J. Lipton, D. J. Rose, R. E. Tarjan, SIAM J. Numer. Anal. 16(2) (1979)" },
  },
  "load-imbalance": {
    title: "The work is unevenly spread",
    severity: "waste",
    text: (e) => `The busiest process does ${show(e["ratio"])} times the ${show(e["what"])} of the idlest.`,
    whatToTry: "Partition by unknowns and weight cells by their faces; look whether one block, such as a factorised Schur complement, sits on few processes.",
    source: { kind: "common-practice", citation: "Common practice, no source; the ratio is the one PETSc's performance summary prints" },
  },
  "unused-options": {
    title: "Options were set that nothing used",
    severity: "risk",
    text: (e) => `${show(e["count"])} unused: ${show(e["options"])}. What was run may not be what was meant.`,
    whatToTry: "Compare the prefix of each with those in the solver view; a split's name or a nested solver's prefix is the usual slip.",
    source: { kind: "common-practice", citation: "Common practice, no source; reported by PETSc's -options_left" },
  },
  "zero-pivot": {
    title: "A pivot is zero",
    severity: "failure",
    text: (e) => `The factorisation met a zero pivot or a missing diagonal entry${e["reason"] === undefined ? "" : `: ${e["reason"]}`}.`,
    whatToTry: "The pressure block of the system is zero: incomplete factorisations of the whole matrix can't work. Factorise with pivoting (MUMPS), or use a block preconditioner. With flux prescribed everywhere pin one pressure or attach the null space.",
    source: { kind: "published", citation: convergenceSurvey },
  },
  "null-pivots": {
    title: "The factorisation found null pivots",
    severity: "risk",
    text: (e) => `${show(e["nullPivots"])} null pivots: the matrix is singular to working accuracy.`,
    whatToTry: "With flux prescribed everywhere one null pivot is the constant pressure: pin one pressure or attach the null space. More than one points at the assembly.",
    source: { kind: "common-practice", citation: "Common practice, no source; MUMPS INFOG(28)" },
  },
  "workspace-too-small": {
    title: "The factorisation's work space is too small",
    severity: "failure",
    text: (e) => `MUMPS stopped for want of work space (-9)${e["growth"] === undefined ? "" : `: ${show(e["growth"])} times the entries it had estimated`}.`,
    whatToTry: "Raise ICNTL(14), the relaxation of the estimate in percent, from 20 to 100; if delayed pivots are many, use ICNTL(12) = 1 or LU. The machine's memory is not the cause.",
    source: { kind: "measured", citation: `${referenceRuns}: raising ICNTL(14) cured every such run that was tried again` },
  },
  "out-of-memory": {
    title: "Memory ran out",
    severity: "failure",
    text: (e) => `The run ended for want of memory${e["peakMemoryGiB"] === undefined ? "" : ` at ${show(e["peakMemoryGiB"])} GiB`}.`,
    whatToTry: "Use more nodes or fewer processes a node, block low-rank compression, or a strategy without a large factorisation.",
    source: { kind: "published", citation: "Factor entries grow as n^(4/3): R. J. Lipton, D. J. Rose, R. E. Tarjan, SIAM J. Numer. Anal. 16(2) (1979)" },
  },
} as const satisfies Record<string, FindingDefinition>;

export type FindingId = keyof typeof findings;
