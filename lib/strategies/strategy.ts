import type { Answers, } from "@/lib/questionnaire/answers";
import type { Capability, Discretisation } from "@/lib/questionnaire/answer-sets";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Sizes } from "@/lib/sizes/sizes";
import type { CostKit, StrategyCost } from "./cost";

/** What a strategy's cost and options are computed from. */
export type StrategyContext = { answers: Answers; sizes: Sizes };

/** A parameter a person may change, with what it does. `unit` "" for pure numbers. */
export type ParameterDefinition = {
  name: string;
  label: string;
  unit: string;
  help: string;
  default: (context: StrategyContext) => number | string;
  range: readonly [number, number] | readonly string[];
};

/** Options in PETSc's syntax with the calling lines they need, or a prose recipe with the reason why options can't express it. */
export type OptionsFile =
  | { kind: "petsc"; filename: string; text: string; callingLines: string | null }
  | { kind: "recipe-only"; reason: string };

export type OptionsContext = StrategyContext & {
  /** Parameters after the rules' `set` effects. */
  parameters: Record<string, number | string>;
  /** Highest iterations and memory of the estimate, for limits. */
  iterationsHigh: number;
  memoryGiBHigh: number;
};

export type StrategyDefinition = {
  id: StrategyId;
  name: string;
  summary: string;
  needs: readonly Capability[];
  /** Discretisations it exists for; others are unavailable with `notForReason`. */
  discretisations: readonly Discretisation[];
  notForReason: string;
  krylovMethod: "none" | "minres" | "gmres" | "fgmres" | "cg";
  monitoredNorm: "none" | "preconditioned" | "unpreconditioned" | "natural";
  parameters: readonly ParameterDefinition[];
  weakSpots: readonly string[];
  fallback: { strategy: StrategyId; when: string };
  cost: (kit: CostKit, context: StrategyContext) => StrategyCost;
  options: (context: OptionsContext) => OptionsFile;
  /** The same in prose: numbered steps for a program that is not PETSc. */
  recipe: (context: OptionsContext) => readonly string[];
};
