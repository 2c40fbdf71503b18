import { advisedGamma } from "@/lib/strategies/regularisation";
import type { OptionsContext, StrategyContext } from "@/lib/strategies/strategy";

/** Names of the parameters that options files read. A missing or unusable one falls back to its advised value. */
export const parameterNames = [
  "gamma",
  "gammaOverH2",
  "krylovMethod",
  "restart",
  "workspacePercent",
  "ordering",
  "symmetricAnalysis",
  "blrTolerance",
  "amgPackage",
  "strongThreshold",
  "factorisation",
  "residualTest",
  "monitoredTolerance",
  "overlap",
  "subdomains",
] as const;
export type ParameterName = (typeof parameterNames)[number];

export const krylovMethods = ["minres", "gmres", "fgmres"] as const;
export type KrylovMethod = (typeof krylovMethods)[number];
export const amgPackages = ["boomeramg", "gamg"] as const;
export type AmgPackage = (typeof amgPackages)[number];
export const orderings = ["metis", "pord", "amf", "scotch", "automatic"] as const;
export type Ordering = (typeof orderings)[number];
export const factorisations = ["full", "lower", "upper"] as const;
export type Factorisation = (typeof factorisations)[number];
export const residualTests = ["automatic", "plain", "guarded"] as const;
export type ResidualTest = (typeof residualTests)[number];

/** A positive number among the parameters, or `fallback`. */
export function positiveParameter(context: OptionsContext, name: ParameterName, fallback: number): number {
  const raw = context.parameters[name];
  const value = typeof raw === "string" ? Number(raw) : raw;
  return value !== undefined && Number.isFinite(value) && value > 0 ? value : fallback;
}

/** One of a closed set among the parameters, or `fallback`. */
export function choiceParameter<Choice extends string>(
  context: OptionsContext,
  name: ParameterName,
  choices: readonly Choice[],
  fallback: Choice,
): Choice {
  const raw = context.parameters[name];
  return choices.find((choice) => choice === raw) ?? fallback;
}

/** Gamma as the parameters leave it: `gamma` itself if set, else `gammaOverH2` times h^2 / nu_ref, else the advised value. */
export function gammaOf(context: OptionsContext): number {
  const advised = advisedGamma(context);
  const ratio = positiveParameter(context, "gammaOverH2", advised.overH2);
  return positiveParameter(context, "gamma", (ratio * context.sizes.spacing ** 2) / context.answers.coefficientScale);
}

/** Extra work space of the factorisation in per cent of its own forecast: MUMPS' 20 sufficed up to a contrast of 1e3. */
export function advisedWorkspacePercent({ answers }: StrategyContext): number {
  if (answers.contrast.ratio >= 1e4) return 100;
  return answers.contrast.ratio > 10 ? 60 : 30;
}

/**
 * Whether MUMPS analyses the matrix itself (ICNTL(12) = 1) instead of a graph compressed by 2x2 pivots: up to 1.5 times faster from
 * degree 2 on and on small tetrahedral systems, up to 1.7 times slower at lowest order else, where at contrast it also delays so many
 * pivots that the work space runs out. From the reference runs and model systems of the same kind.
 */
export function advisedSymmetricAnalysis({ answers, sizes }: StrategyContext): "matrix" | "compressed" {
  if (answers.degree >= 2) return "matrix";
  const smallTetrahedral = answers.meshFamily === "tetrahedra" && sizes.unknowns < smallSystem;
  return smallTetrahedral && answers.contrast.ratio <= 1e4 ? "matrix" : "compressed";
}

/** Nested dissection pays from about these many unknowns on; below, its analysis takes longer than it saves. */
const smallSystem = 10_000;
const smallTetrahedralSystem = 25_000;

export function advisedOrdering({ answers, sizes }: StrategyContext): Ordering {
  const least = answers.meshFamily === "tetrahedra" ? smallTetrahedralSystem : smallSystem;
  return sizes.unknowns < least ? "automatic" : "metis";
}

/** Dropping tolerance of block low-rank blocks: two decades below what the outer iteration needs from one application. */
export function advisedBlrTolerance({ answers }: StrategyContext): number {
  return Math.min(1e-4, Math.max(1e-9, Math.sqrt(answers.tolerance) * 1e-3));
}

/** BoomerAMG where the coefficient jumps (plain aggregation needed up to ten times the iterations in the reference runs) and elsewhere. */
export const advisedAmgPackage: AmgPackage = "boomeramg";
export const advisedRestart = 100;
export const advisedStrongThreshold = 0.5;
export const advisedOverlap = 1;
