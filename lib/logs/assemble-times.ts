import { setValue, type Assembly } from "@/lib/logs/assembly";

/**
 * Set-up and solve time from the event table. PETSc starts the event KSPSolve after the set-up, so the two do not
 * overlap (in the genuine logs the factorisation's time is in PCSetUp only). Events are summed over calls, so a time is
 * one solve's only when the program made one. PCSetUp is the set-up of the preconditioner and its blocks; KSPSetUp, the
 * Krylov method's own vectors, is nested in it for some preconditioners and is left out.
 */
export function assembleTimes(assembly: Assembly): void {
  const { program, problems, result, solve } = assembly;
  const { performance } = program;
  result.performance = performance.summary();
  if (!performance.started) return;
  if (!performance.tableComplete) {
    problems.add("warning", performance.processes.line, "The performance summary is cut; times are left open.");
    return;
  }
  for (const name of ["PCSetUp", "KSPSolve"]) {
    if (performance.isAmbiguous(name)) problems.add("warning", null, `The event table shows ${name} twice with different figures; its time is left open.`);
  }
  const solved = performance.event("KSPSolve");
  const seen = assembly.programSolves ?? 0;
  const single = solved === null ? seen <= 1 : solved.calls === 1 && seen <= 1;
  if (solved !== null && seen > 0 && solved.calls !== seen) {
    problems.add("warning", solved.line, `The event table counts ${solved.calls} solves, the log shows ${seen}; times are left open.`);
  } else if (solved !== null && !single) {
    problems.add("note", solved.line, `The event table sums ${solved.calls} solves (${solved.seconds} s together); the time of one is left open.`);
  }
  const setup = performance.event("PCSetUp");
  const oneSetup = setup !== null && (single || (setup.calls === 1 && (solved === null || solved.calls === seen)));
  if (setup !== null && oneSetup) setValue(assembly, "setupSeconds", setup.seconds, setup.line);
  // A solve that ended in the set-up, or of which the log says no end, took no time worth recording.
  const ended = solve?.reason != null && !solve.reason.name.startsWith("DIVERGED_PC");
  if (solved !== null && single && ended) setValue(assembly, "solveSeconds", solved.seconds, solved.line);
}
