import { keepString } from "@/lib/logs/keep-string";
import type { Outcome } from "@/lib/runs/run";

/** What a reason says about the run: `fixed` ran a set number of iterations without a test; `other` none of ours. */
type Meaning = Outcome | "fixed" | "set-up-failed" | "other";

/** PETSc's names of why a linear solve ended, versions 3.1 to 3.24 (names as printed by `-ksp_converged_reason`). */
export const convergedReasons = {
  CONVERGED_RTOL: "converged",
  CONVERGED_ATOL: "converged",
  CONVERGED_RTOL_NORMAL: "converged",
  CONVERGED_ATOL_NORMAL: "converged",
  CONVERGED_RTOL_NORMAL_EQUATIONS: "converged",
  CONVERGED_ATOL_NORMAL_EQUATIONS: "converged",
  CONVERGED_HAPPY_BREAKDOWN: "converged",
  CONVERGED_ITS: "fixed",
  CONVERGED_NEG_CURVE: "other",
  CONVERGED_STEP_LENGTH: "other",
  CONVERGED_CG_NEG_CURVE: "other",
  CONVERGED_CG_CONSTRAINED: "other",
  CONVERGED_ITERATING: "other",
  CONVERGED_USER: "other",
  DIVERGED_NULL: "diverged",
  DIVERGED_ITS: "stalled",
  DIVERGED_MAX_IT: "stalled",
  DIVERGED_DTOL: "diverged",
  DIVERGED_BREAKDOWN: "diverged",
  DIVERGED_BREAKDOWN_BICG: "diverged",
  DIVERGED_NONSYMMETRIC: "diverged",
  DIVERGED_INDEFINITE_PC: "diverged",
  DIVERGED_INDEFINITE_MAT: "diverged",
  DIVERGED_NAN: "diverged",
  DIVERGED_NANORINF: "diverged",
  DIVERGED_PC_FAILED: "set-up-failed",
  DIVERGED_PCSETUP_FAILED: "set-up-failed",
  DIVERGED_USER: "other",
} as const satisfies Record<string, Meaning>;
export type ConvergedReason = keyof typeof convergedReasons;

export function isConvergedReason(name: string): name is ConvergedReason {
  return Object.hasOwn(convergedReasons, name);
}

export type ReasonLine = { name: string; converged: boolean; iterations: number; prefix: string; level: number };

const pattern = /^( *)Linear (?:(\S{1,200}) )?solve (converged|did not converge) due to ([A-Z_]{4,60}) iterations (\d{1,9})$/;

/** Reads `Linear solve converged due to CONVERGED_RTOL iterations 39`, null unless the whole line has that form. */
export function readReasonLine(text: string): ReasonLine | null {
  const match = pattern.exec(text.trimEnd());
  if (match === null) return null;
  const [, indent = "", prefix = "", verb, name = "", iterations] = match;
  return { name: keepString(name), converged: verb === "converged", iterations: Number(iterations), prefix: keepString(prefix), level: Math.floor(indent.length / 2) };
}

/** Prefixes that PETSc gives to solvers inside another one, whatever the indentation says. */
export function isNestedPrefix(prefix: string): boolean {
  return /(?:^|_)(?:fieldsplit_[^_]+|mg_(?:coarse|levels_\d+)|sub|inner|telescope|redundant|galerkin|lsc|bddc_.*|ksp)_$/.test(prefix);
}
