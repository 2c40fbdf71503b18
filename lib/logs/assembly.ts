import type { ParsedLog } from "@/lib/logs/parsed-log";
import type { ProblemList } from "@/lib/logs/problem-list";
import type { ProgramRecord } from "@/lib/logs/program-record";
import type { Solve } from "@/lib/logs/solve-tracker";
import type { SolverView } from "@/lib/logs/solver-view";

/** Everything the parts of the result are made from. */
export type Assembly = {
  program: ProgramRecord;
  solve: Solve | null;
  view: SolverView | null;
  /** Solves of this program, null when unknown. */
  programSolves: number | null;
  result: ParsedLog;
  problems: ProblemList;
};

type SingleValue =
  | "strategy" | "krylovMethod" | "reason" | "iterations" | "processes" | "setupSeconds" | "solveSeconds" | "peakMemoryGiB"
  | "trueRelativeResidual" | "monitoredRelativeResidual" | "monitoredNorm" | "factorEntries" | "outcome" | "preconditioner"
  | "factorisation" | "factorPackage" | "systemUnknowns" | "restart";

/** Records a value and its line; null leaves both out. */
export function setValue<K extends SingleValue>({ result }: Assembly, field: K, value: ParsedLog[K] | null, line: number | null): void {
  if (value === null || line === null) return;
  Object.assign(result, { [field]: value });
  result.lines[field] = line;
}
