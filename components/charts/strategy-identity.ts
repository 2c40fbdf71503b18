import type { StrategyId } from "@/lib/shared/strategy-ids";

/** The strategies, and `other` for a recorded run by none of them. */
export type StrategyMarkId = StrategyId | "other";

export const strategyColours: Record<StrategyMarkId, string> = {
  "direct-ldlt": "var(--strategy-direct-ldlt)",
  "direct-blr": "var(--strategy-direct-blr)",
  "schur-diag-direct": "var(--strategy-schur-diag-direct)",
  "schur-diag-amg": "var(--strategy-schur-diag-amg)",
  "schur-triangular": "var(--strategy-schur-triangular)",
  "regularized-amg": "var(--strategy-regularized-amg)",
  "hdiv-auxiliary": "var(--strategy-hdiv-auxiliary)",
  "hybridized-amg": "var(--strategy-hybridized-amg)",
  bddc: "var(--strategy-bddc)",
  "schwarz-two-level": "var(--strategy-schwarz-two-level)",
  "p-multigrid": "var(--strategy-p-multigrid)",
  other: "var(--strategy-other)",
};

export type MarkShape = {
  /** Path data in a box from -6 to 6 about the marked point, y downwards. */
  path: string;
  /** Solid shapes are filled; line shapes are strokes of width 2.4 only. */
  drawing: "solid" | "line";
  /** The shape in a word, for legends and screen readers. */
  name: string;
};

/** One shape a strategy. Relatives share an outline: the two factorisations are squares, the two diagonal Schur methods discs. */
export const strategyShapes: Record<StrategyMarkId, MarkShape> = {
  "direct-ldlt": { path: "M-5-5H5V5H-5Z", drawing: "solid", name: "square" },
  "direct-blr": { path: "M-5-5H5V5H-5ZM-2.2-2.2V2.2H2.2V-2.2Z", drawing: "solid", name: "hollow square" },
  "schur-diag-direct": { path: "M-5.4 0A5.4 5.4 0 1 0 5.4 0A5.4 5.4 0 1 0-5.4 0Z", drawing: "solid", name: "disc" },
  "schur-diag-amg": { path: "M-5.4 0A5.4 5.4 0 1 0 5.4 0A5.4 5.4 0 1 0-5.4 0ZM-2.6 0A2.6 2.6 0 1 1 2.6 0A2.6 2.6 0 1 1-2.6 0Z", drawing: "solid", name: "ring" },
  "schur-triangular": { path: "M-5.2-5.2V5.2H5.2Z", drawing: "solid", name: "right triangle" },
  "regularized-amg": { path: "M0-6L6 0L0 6L-6 0Z", drawing: "solid", name: "diamond" },
  "hdiv-auxiliary": { path: "M0-6L6 0L0 6L-6 0ZM0-2.6L-2.6 0L0 2.6L2.6 0Z", drawing: "solid", name: "hollow diamond" },
  "hybridized-amg": { path: "M-3-5.2H3L6 0L3 5.2H-3L-6 0Z", drawing: "solid", name: "hexagon" },
  bddc: { path: "M0-5.5V5.5M-5.5 0H5.5", drawing: "line", name: "upright cross" },
  "schwarz-two-level": { path: "M-4.4-4.4L4.4 4.4M-4.4 4.4L4.4-4.4", drawing: "line", name: "slanted cross" },
  "p-multigrid": { path: "M-6 4.6L0-5.6L6 4.6Z", drawing: "solid", name: "triangle" },
  other: { path: "M-5 0H5", drawing: "line", name: "dash" },
};

export type Hatch = { /** Path data of one 12 x 12 tile. */ path: string; strokeWidth: number };

/** One hatch a strategy, for areas on the terrain and in print. */
export const strategyHatches: Record<StrategyMarkId, Hatch> = {
  "direct-ldlt": { path: "M0 3H12M0 9H12", strokeWidth: 1.4 },
  "direct-blr": { path: "M0 3H5M0 9H5M7 6H12M7 0H12M7 12H12", strokeWidth: 1.4 },
  "schur-diag-direct": { path: "M-3 3L3-3M-3 15L15-3M9 15L15 9", strokeWidth: 1.4 },
  "schur-diag-amg": { path: "M1 11L5 7M7 5L11 1", strokeWidth: 1.6 },
  "schur-triangular": { path: "M-3 9L3 15M-3-3L15 15M9-3L15 3", strokeWidth: 1.4 },
  "regularized-amg": { path: "M0 12L6 6L12 12M0 6L6 0L12 6", strokeWidth: 1.2 },
  "hdiv-auxiliary": { path: "M6 2.5L9.5 6L6 9.5L2.5 6Z", strokeWidth: 1.2 },
  "hybridized-amg": { path: "M3 0V12M9 0V12", strokeWidth: 1.4 },
  bddc: { path: "M3 0V6M0 3H6M9 6V12M6 9H12", strokeWidth: 1.2 },
  "schwarz-two-level": { path: "M-3-3L15 15M-3 15L15-3", strokeWidth: 0.9 },
  "p-multigrid": { path: "M2 9L6 3L10 9Z", strokeWidth: 1.2 },
  other: { path: "M6 5V7", strokeWidth: 2 },
};
