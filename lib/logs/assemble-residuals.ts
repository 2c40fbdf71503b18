import { setValue, type Assembly } from "@/lib/logs/assembly";
import { lineOf, wordOf } from "@/lib/logs/solver-view";
import { monitoredNorms } from "@/lib/runs/run";

type Norm = (typeof monitoredNorms)[number];

function isNorm(name: string | undefined): name is Norm {
  return monitoredNorms.some((norm) => norm === name);
}

/** Final residuals and their history. Final means: of the iteration that the converged reason names. */
export function assembleResiduals(assembly: Assembly): void {
  const { solve, result, problems } = assembly;
  reportNorm(assembly);
  if (solve === null) return;
  result.residualHistory = solve.history.points();
  result.historyStride = solve.history.stride;
  if (result.residualHistory.length > 0) result.lines["residualHistory"] = solve.line;
  if (solve.nonFiniteAt !== null) problems.add("warning", solve.nonFiniteAt, "A residual is not a number.");
  if (solve.brokenAt !== null) problems.add("warning", solve.brokenAt, "Residuals are missing or out of order from here; the final residual is left open.");
  const whole = isWhole(assembly);
  if (whole) reportMonitored(assembly);
  reportTrue(assembly, whole);
}

/** Whether the last residual read is that of the last iteration. */
function isWhole({ solve, problems }: Assembly): boolean {
  if (solve === null || !solve.ended || solve.brokenAt !== null || solve.last === null) return false;
  if (solve.reason === null || solve.reason.iterations === solve.last.iteration) return true;
  if (solve.reason.converged) {
    problems.add("warning", solve.reason.line, `The solve took ${solve.reason.iterations} iterations, the last residual printed is that of ${solve.last.iteration}; both are left open.`);
  }
  return false;
}

function reportNorm(assembly: Assembly): void {
  const { solve, view, problems } = assembly;
  const printed = solve?.norm ?? null;
  const shown = wordOf(view?.krylov, "norm")?.toLowerCase();
  const monitored = printed?.value ?? undefined;
  if (isNorm(shown) && isNorm(monitored) && shown !== monitored) {
    problems.add("warning", printed?.line ?? null, `The monitor prints the ${monitored} norm, the solver tests the ${shown} one; the norm is left open.`);
    return;
  }
  if (isNorm(monitored)) setValue(assembly, "monitoredNorm", monitored, printed?.line ?? null);
  else if (isNorm(shown) && printed?.contradictedAt == null) setValue(assembly, "monitoredNorm", shown, lineOf(view?.krylov, "norm"));
}

/** Last over first monitored norm: what the solver's own test compares with its tolerance when it starts from zero. */
function reportMonitored(assembly: Assembly): void {
  const { solve, view, result, problems } = assembly;
  if (solve?.last == null || result.monitoredNorm === "none") return;
  if (wordOf(view?.krylov, "guess") === "nonzero initial guess") {
    problems.add("note", lineOf(view?.krylov, "guess"), "The solve starts from a guess; its monitored residual relative to the right-hand side is not printed.");
    return;
  }
  const ratio = solve.last.monitored / solve.first;
  if (Number.isFinite(ratio)) setValue(assembly, "monitoredRelativeResidual", ratio, solve.lastLine);
}

/** The program's own statement of |b - Kx| / |b| if there is one, else that of the last monitor line. */
function reportTrue(assembly: Assembly, whole: boolean): void {
  const { solve, problems } = assembly;
  if (solve === null) return;
  const stated = solve.trueResidual;
  const monitored = whole ? (solve.last?.trueRelative ?? Number.NaN) : Number.NaN;
  if (stated.contradictedAt !== null) {
    problems.add("warning", stated.contradictedAt, "Two different true residuals are stated; it is left open.");
    return;
  }
  if (stated.value === null) {
    if (Number.isFinite(monitored)) setValue(assembly, "trueRelativeResidual", monitored, solve.lastLine);
    return;
  }
  if (!Number.isFinite(stated.value)) {
    problems.add("warning", stated.line, "The true residual is stated as not a number.");
    return;
  }
  // A recomputed residual differs from the monitor's by round-off only; a factor of two is no round-off.
  const apart = Number.isFinite(monitored) && (stated.value > 2 * monitored || monitored > 2 * stated.value);
  if (apart) problems.add("warning", stated.line, `The true residual is stated as ${stated.value}, the monitor ends at ${monitored}; it is left open.`);
  else setValue(assembly, "trueRelativeResidual", stated.value, stated.line);
}
