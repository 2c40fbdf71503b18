import { assembleFactor } from "@/lib/logs/assemble-factor";
import { assembleOutcome } from "@/lib/logs/assemble-outcome";
import { assembleResiduals } from "@/lib/logs/assemble-residuals";
import { assembleTimes } from "@/lib/logs/assemble-times";
import { setValue, type Assembly } from "@/lib/logs/assembly";
import type { ProgramQueueResult } from "@/lib/logs/log-reader";
import { emptyParsedLog, type ParsedLog } from "@/lib/logs/parsed-log";
import type { ProblemList } from "@/lib/logs/problem-list";
import { recogniseStrategy } from "@/lib/logs/recognise-strategy";
import { lineOf, numberOf, type SolverView } from "@/lib/logs/solver-view";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";

const bytesPerGiB = 2 ** 30;

type Input = { programs: ProgramQueueResult; problems: ProblemList; linesRead: number; doubled: boolean };

/** Turns what was read into the published shape: last complete solve, each value with its line, doubts as problems. */
export function assembleLog({ programs, problems, linesRead, doubled }: Input): ParsedLog {
  const program = programs.chosen;
  const { tracker } = program;
  const result = emptyParsedLog();
  result.linesRead = linesRead;
  const copies = doubled ? tracker.repeatedReasons : 0;
  const mixedAt = tracker.mixedAt ?? program.secondSummaryAt;
  const programSolves = mixedAt === null ? tracker.completed - copies : null;
  const unstated = tracker.completed === 0 && tracker.current !== null;
  result.solves = programs.solves === null || mixedAt !== null || unstated ? null : programs.solves - copies;
  const solve = tracker.lastComplete ?? tracker.current;
  const assembly: Assembly = { program, solve, view: solve?.view ?? tracker.loneView, programSolves, result, problems };

  if (programs.later !== null) problems.add("warning", programs.later, "A later run in this log has no complete solve; the last complete one is reported.");
  if (mixedAt !== null) reportMixed(assembly, mixedAt);
  else reportAll(assembly);
  reportOptions(assembly);
  if (!program.speaks && linesRead > 0) problems.add("error", null, "Nothing a known solver prints was found in this log.");
  result.problems = problems.items();
  return result;
}

/** Two outputs interleaved: no value can be told to be one run's. Unused options are the exception, they name themselves. */
function reportMixed({ result, problems }: Assembly, line: number): void {
  problems.add("error", line, "The output of several solves is mixed here; no value can be attributed to one of them.");
  result.residualHistory = [];
}

function reportAll(assembly: Assembly): void {
  const { result, problems, solve, program } = assembly;
  reportSolver(assembly);
  reportProcesses(assembly);
  assembleFactor(assembly);
  assembleResiduals(assembly);
  assembleOutcome(assembly);
  assembleTimes(assembly);
  reportMemory(assembly);
  if (result.solves !== null && result.solves > 1) {
    problems.add("note", solve?.line ?? null, `The log holds ${result.solves} solves; the last complete one is reported.`);
  }
  if (solve !== null && solve !== program.tracker.lastComplete) {
    problems.add("warning", solve.lastLine, "The log ends before the solve does, or says nothing of how it ended. Add -ksp_converged_reason.");
  } else if (program.tracker.current !== solve && program.tracker.current !== null) {
    problems.add("warning", program.tracker.current.line, "A later solve is not complete; the last complete one is reported.");
  }
}

function reportSolver(assembly: Assembly): void {
  const { view, result, program, problems } = assembly;
  if (view !== null) {
    const { krylov, preconditioner } = view;
    setValue(assembly, "krylovMethod", krylov.type.value, krylov.type.line);
    setValue(assembly, "preconditioner", preconditioner?.type.value ?? null, preconditioner?.type.line ?? null);
    setValue(assembly, "restart", numberOf(krylov, "restart"), lineOf(krylov, "restart"));
    reportTolerances(assembly, view);
    const system = preconditioner?.children.find((child) => child.kind === "Mat" && child.role === "system");
    setValue(assembly, "systemUnknowns", numberOf(system, "rows"), lineOf(system, "rows"));
    const recognised = recogniseStrategy(view);
    if (recognised !== null) {
      setValue(assembly, "strategy", recognised.strategy, recognised.line);
      if (recognised.note !== null) problems.add("note", recognised.line, recognised.note);
    }
  }
  result.libraryVersion = program.performance.version.value;
  reportNamedStrategy(assembly);
}

function reportTolerances({ result }: Assembly, { krylov }: SolverView): void {
  const relative = numberOf(krylov, "relative");
  const maximumIterations = numberOf(krylov, "maximumIterations");
  if (relative === null && maximumIterations === null) return;
  const divergence = numberOf(krylov, "divergence");
  result.tolerances = { relative, absolute: numberOf(krylov, "absolute"), divergence, maximumIterations };
  const line = lineOf(krylov, "relative") ?? lineOf(krylov, "maximumIterations");
  if (line !== null) result.lines["tolerances"] = line;
}

function isStrategy(name: string): name is StrategyId {
  return strategyIds.some((id) => id === name);
}

function reportNamedStrategy(assembly: Assembly): void {
  const { result, program, problems } = assembly;
  const { value, line } = program.strategyName;
  if (line === null) return;
  if (value === null || !isStrategy(value)) {
    problems.add("warning", line, "The log names no strategy of this product, or several.");
  } else if (result.strategy !== null && result.strategy !== value) {
    problems.add("warning", line, `The log names ${value}, but the solver it shows is ${result.strategy}.`);
    result.strategy = null;
    delete result.lines["strategy"];
  } else setValue(assembly, "strategy", value, line);
}

function reportProcesses(assembly: Assembly): void {
  const { view, program, problems } = assembly;
  const shown = view?.krylov.processes ?? null;
  const summed = program.performance.processes;
  if (shown !== null && summed.value !== null && shown !== summed.value) {
    problems.add("warning", summed.line, `The solver ran on ${shown} processes, the program on ${summed.value}; the number of processes is left open.`);
    return;
  }
  const line = shown === null ? summed.line : (view?.line ?? null);
  const processes = shown ?? summed.value;
  if (processes !== null && processes > 0) setValue(assembly, "processes", processes, line);
}

function reportMemory(assembly: Assembly): void {
  const { peakMemoryBytes } = assembly.program;
  if (peakMemoryBytes.value !== null) setValue(assembly, "peakMemoryGiB", peakMemoryBytes.value / bytesPerGiB, peakMemoryBytes.line);
  if (peakMemoryBytes.contradictedAt !== null) {
    assembly.problems.add("warning", peakMemoryBytes.contradictedAt, "Two different peaks of memory are printed; memory is left open.");
  }
}

function reportOptions({ program, result, problems }: Assembly): void {
  const unused = program.options.unused();
  result.options = program.options.options();
  result.unusedOptions = unused.map(({ name }) => name);
  const [first] = unused;
  if (first !== undefined) {
    result.lines["unusedOptions"] = first.line;
    problems.add("warning", first.line, `Options that nothing used: ${result.unusedOptions.slice(0, 8).join(", ")}. They may be misspelt.`);
  }
  const { announced } = program.options;
  if (announced !== null && announced.count !== unused.length) {
    problems.add("note", announced.line, `The log counts ${announced.count} unused options and names ${unused.length}.`);
  }
}
