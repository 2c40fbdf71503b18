import type { StrategyContext } from "./strategy";

/** One step of the reasoning behind a number; the same shape as an estimate's `why`. */
export type CostStep = {
  quantity: string;
  formula: string;
  inputs: { name: string; value: number | string; unit: string }[];
  value: number;
  unit: string;
  source: string;
};

/** Spectral interval of diag(A)^-1 A with where it comes from. */
export type SpectralInterval = { low: number; high: number; source: string; computed: boolean };

/** A sparse factorisation on the machine of the answers. Seconds are wall seconds; memory is summed over processes. */
export type DirectCost = {
  entries: number;
  flops: number;
  analysisSeconds: number;
  factorSeconds: number;
  /** One forward and backward substitution. */
  solveSeconds: number;
  memoryBytes: number;
  why: CostStep[];
};

/** Algebraic multigrid on one block. */
export type MultigridCost = { setupSeconds: number; cycleSeconds: number; memoryBytes: number; why: CostStep[] };

/** A Krylov count: expected and, where theory gives one, bounded, at the tolerance of the monitored norm. */
export type IterationCount = { expected: number; bound: number | null; why: CostStep[] };

/** How a residual in the monitored norm relates to the true one; see `residualLag` of the kit. */
export type ResidualLag = { lag: number; monitoredTolerance: number; why: CostStep };

/** Which residuals on measured runs give a strategy its ranges. */
export const accuracyClasses = ["direct", "block-diagonal", "block-factorised", "regularised", "hybridised", "auxiliary", "theory"] as const;
export type AccuracyClass = (typeof accuracyClasses)[number];

export const krylovMatrices = ["system", "condensed"] as const;

/** What one Krylov iteration moves, besides its preconditioner. */
export type IterationTraffic = {
  /** Nonzeros of the matrix applied, as stored. */
  nonzeros: number;
  unknowns: number;
  /** Vectors of length `unknowns` read or written. */
  vectors: number;
  /** Global reductions. */
  reductions: number;
};

/**
 * The tools of lib/estimates, bound to one case and machine: sizes after the boundary condition, spectral interval, machine rates. Everything is
 * lazy, so that a strategy pays for what it uses.
 */
export type CostKit = {
  /** Unknowns and nonzeros that are solved for: boundary fluxes that are prescribed are left out. */
  system: { unknowns: number; velocityUnknowns: number; pressureUnknowns: number; nonzeros: number; velocityNonzeros: number; schurNonzeros: number };
  /** Face multipliers of the hybridised system. */
  multipliers: { unknowns: number; nonzeros: number };
  /** Regularisation weight: gamma = c h^2 / nu_ref. */
  gamma: { value: number; overH2: number };
  spectralInterval: () => SpectralInterval;
  /** LDLᵀ of the whole system, optionally with block low-rank compression. */
  factoriseSystem: (options: { lowRank: boolean }) => DirectCost;
  /** Cholesky of B diag(A)^-1 Bᵀ. */
  factoriseSchur: () => DirectCost;
  multigridOn: (block: "schur" | "augmented" | "multipliers" | "auxiliary") => MultigridCost;
  iterations: {
    blockDiagonal: (schur: "exact" | "multigrid", tolerance: number) => IterationCount;
    blockFactorised: (tolerance: number) => IterationCount;
    regularised: (tolerance: number) => IterationCount;
    hybridised: (tolerance: number) => IterationCount;
    auxiliarySpace: (tolerance: number) => IterationCount;
    bddc: (tolerance: number) => IterationCount;
    schwarz: (tolerance: number) => IterationCount;
    pMultigrid: (tolerance: number) => IterationCount;
  };
  residualLag: (norm: "block-diagonal" | "regularised" | "auxiliary" | "condensed") => ResidualLag;
  iterationSeconds: (traffic: IterationTraffic) => number;
  /** Substructuring of the domain into one subdomain a core: local factorisations and a coarse problem. */
  subdomains: (kind: "bddc" | "schwarz") => DirectCost;
  /** Bytes of the assembled matrix and of `vectors` vectors of the system. */
  storageBytes: (nonzeros: number, unknowns: number, vectors: number) => number;
  /** Seconds to stream so many bytes once through all cores. */
  streamSeconds: (bytes: number) => number;
};

/** What a strategy's cost model answers; estimates turn it into ranges. */
export type StrategyCost = {
  iterations: number;
  iterationBound: number | null;
  interval: SpectralInterval | null;
  memoryBytes: number;
  setupSeconds: number;
  solveSeconds: number;
  factor: { entries: number; flops: number } | null;
  parameters: Record<string, number | string>;
  notes: string[];
  why: CostStep[];
  accuracy: AccuracyClass;
};

export type CostModel = (kit: CostKit, context: StrategyContext) => StrategyCost;
