import { setValue, type Assembly } from "@/lib/logs/assembly";
import { convergedReasons, isConvergedReason } from "@/lib/logs/converged-reasons";
import type { Outcome } from "@/lib/runs/run";

/** Above this true relative residual a solve that met its own test has a wrong answer (the reference runs' limit). */
const wrongAnswerResidual = 1e-2;

/** Outcome, reason and iterations; a failure of the program counts where no solve was completed before it. */
export function assembleOutcome(assembly: Assembly): void {
  const { solve, program, problems, result } = assembly;
  const failure = program.failure.failure();
  if (solve?.reason) reportReason(assembly);
  if (failure === null) return;
  const completed = program.tracker.lastComplete?.reason != null;
  if (completed && result.outcome !== null) {
    problems.add("warning", failure.line, `After the solve: ${failure.text} (${failure.reason})`);
    return;
  }
  const cause = mumpsFailure(assembly);
  const outcome = cause?.outcome ?? failure.outcome;
  setValue(assembly, "reason", failure.reason.slice(0, 400), failure.line);
  setValue(assembly, "outcome", outcome, failure.line);
  result.reasonText = cause?.text ?? failure.text;
  problems.add("error", failure.line, result.reasonText);
}

function reportReason(assembly: Assembly): void {
  const { solve, result, problems } = assembly;
  const reason = solve?.reason;
  if (solve == null || reason == null) return;
  // Residuals that end elsewhere without a gap, or go on behind the last iteration: one of the statements is damaged.
  const last = solve.last?.iteration ?? reason.iterations;
  const contradicted = reason.converged && (solve.brokenAt === null ? last !== reason.iterations : last > reason.iterations);
  if (!contradicted) setValue(assembly, "iterations", reason.iterations, reason.line);
  setValue(assembly, "reason", reason.name, reason.line);
  const { name } = reason;
  if (!isConvergedReason(name) || name.startsWith("CONVERGED") !== reason.converged) {
    problems.add("warning", reason.line, `The reason ${reason.name} is not known; the outcome is left open.`);
    return;
  }
  const meaning = convergedReasons[name];
  if (meaning === "set-up-failed") return reportSetupFailure(assembly);
  if (meaning === "other") return problems.add("note", reason.line, `${reason.name} is no convergence test of the residual; the outcome is left open.`);
  if (meaning === "fixed" && !isSinglePass(assembly)) {
    return problems.add("note", reason.line, "The solver ran a fixed number of iterations without a test; the outcome is left open.");
  }
  const outcome = meaning === "fixed" ? "converged" : meaning;
  const residual = result.trueRelativeResidual;
  if (outcome === "converged" && residual !== null && residual > wrongAnswerResidual) {
    setValue(assembly, "outcome", "broken", result.lines["trueRelativeResidual"] ?? reason.line);
    result.reasonText = `The solver's own test was met, but the true relative residual is ${residual}.`;
    problems.add("error", result.lines["trueRelativeResidual"] ?? reason.line, result.reasonText);
    return;
  }
  setValue(assembly, "outcome", outcome, reason.line);
}

/** A direct solve: one application of a factorisation, which has nothing to test. */
function isSinglePass({ solve, view }: Assembly): boolean {
  const method = view?.krylov.type.value ?? null;
  return solve?.reason?.iterations === 1 && (method === "preonly" || method === "none" || method === null);
}

type Cause = { outcome: Outcome | null; text: string };

/** What MUMPS' error code says (users' guide, section on error diagnostics); from memory, checked for -9 on 5.5.1. */
const mumpsCodes: Record<number, Cause> = {
  [-5]: { outcome: "out-of-memory", text: "MUMPS could not allocate memory in the analysis (-5)." },
  [-7]: { outcome: "out-of-memory", text: "MUMPS could not allocate memory in the analysis (-7)." },
  [-8]: { outcome: "broken", text: "MUMPS' integer work space is too small (-8); raise ICNTL(14)." },
  [-9]: { outcome: "broken", text: "MUMPS' work space is too small (-9); raise ICNTL(14)." },
  [-10]: { outcome: "broken", text: "MUMPS found the matrix singular (-10)." },
  [-13]: { outcome: "out-of-memory", text: "MUMPS could not allocate memory in the factorisation (-13)." },
  [-19]: { outcome: "broken", text: "The memory MUMPS was allowed, ICNTL(23), is too small (-19)." },
};

function mumpsFailure({ program }: Assembly): Cause | null {
  const code = program.failure.mumpsCode?.code ?? program.mumps.value("INFOG(1)")?.value ?? null;
  if (code === null || code >= 0) return null;
  return mumpsCodes[code] ?? { outcome: "broken", text: `MUMPS failed with INFOG(1) = ${code}.` };
}

function reportSetupFailure(assembly: Assembly): void {
  const { solve, result, problems } = assembly;
  const kind = solve?.setupFailure.value ?? null;
  const line = solve?.setupFailure.line ?? solve?.reason?.line ?? null;
  const cause = mumpsFailure(assembly) ?? factorFailure(assembly, kind);
  result.reasonText = cause.text;
  problems.add("error", line, cause.text);
  setValue(assembly, "outcome", cause.outcome, solve?.reason?.line ?? null);
}

/**
 * PETSc's FACTOR_OUTMEMORY covers both a work space that MUMPS sized too small and exhausted memory. A factorisation
 * that failed for want of memory fails when it allocates, before it has any entries; one that ran into the end of its
 * work space has entries and usually delayed pivots (observed with MUMPS 5.5.1).
 */
function factorFailure({ result }: Assembly, kind: string | null): Cause {
  if (kind === "FACTOR_OUTMEMORY") {
    const entries = result.mumps?.entries ?? null;
    if (entries !== null && entries > 0) {
      return { outcome: "broken", text: "The factorisation stopped part way for want of work space (FACTOR_OUTMEMORY after it had begun); raise ICNTL(14)." };
    }
    return { outcome: null, text: "The factorisation ran out of work space or of memory (FACTOR_OUTMEMORY); the log does not say which." };
  }
  if (kind === "FACTOR_NUMERIC_ZEROPIVOT" || kind === "FACTOR_STRUCT_ZEROPIVOT") {
    return { outcome: "broken", text: `A zero pivot stopped the factorisation (${kind}).` };
  }
  return { outcome: "broken", text: kind === null ? "The preconditioner failed." : `The preconditioner failed (${kind}).` };
}
