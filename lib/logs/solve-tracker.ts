import { createClaim } from "@/lib/logs/claim";
import { isNestedPrefix, type ReasonLine } from "@/lib/logs/converged-reasons";
import type { MonitorLine } from "@/lib/logs/monitor-line";
import type { HistoryPool, ResidualHistory } from "@/lib/logs/residual-history";
import type { SolverView } from "@/lib/logs/solver-view";

/** One solve of the outermost solver, as far as the log shows it. */
export function createSolve(history: ResidualHistory, line: number) {
  return {
    line,
    history,
    norm: createClaim<string>(),
    first: Number.NaN,
    last: null as MonitorLine | null,
    /** Line of the last residual. */
    lastLine: line,
    /** Line where the numbering of iterations stopped making sense. */
    brokenAt: null as number | null,
    nonFiniteAt: null as number | null,
    reason: null as (ReasonLine & { line: number }) | null,
    setupFailure: createClaim<string>(),
    view: null as SolverView | null,
    trueResidual: createClaim<number>(),
    ended: false,
  };
}
export type Solve = ReturnType<typeof createSolve>;

function isRepeat(last: MonitorLine, next: MonitorLine): boolean {
  const same = Object.is(last.monitored, next.monitored) && Object.is(last.trueRelative, next.trueRelative);
  return last.iteration === next.iteration && same;
}

/** Follows the solves of one program: which line belongs to which solve of the outermost solver. */
export function createSolveTracker(histories: HistoryPool) {
  let outerLevel: number | null = null;
  let current: Solve | null = null;
  let lastComplete: Solve | null = null;
  let pendingView: SolverView | null = null;
  let completed = 0;
  let repeatedReasons = 0;
  let unfinished = 0;
  let mixedAt: number | null = null;

  /** Whether a line of this depth is the outermost solver's; a shallower one discards what was taken for it. */
  function isOutermost(level: number): boolean {
    if (outerLevel !== null && level > outerLevel) return false;
    if (outerLevel !== null && level < outerLevel) {
      current = null;
      lastComplete = null;
      completed = 0;
      repeatedReasons = 0;
      unfinished = 0;
      mixedAt = null;
    }
    outerLevel = level;
    return true;
  }

  function begin(line: number): Solve {
    if (current !== null && current !== lastComplete) histories.giveBack(current.history);
    const solve = createSolve(histories.take(), line);
    solve.view = pendingView;
    pendingView = null;
    current = solve;
    return solve;
  }

  function continueWith(solve: Solve, entry: MonitorLine, line: number): void {
    if (solve.last === null) solve.first = entry.monitored;
    solve.last = entry;
    solve.lastLine = line;
    if (entry.norm !== null) solve.norm.state(entry.norm, line);
    if (Number.isNaN(entry.monitored) && !entry.rounded) solve.nonFiniteAt ??= line;
    solve.history.add(entry);
  }

  function complete(solve: Solve): void {
    solve.ended = true;
    if (lastComplete !== null && lastComplete !== solve) histories.giveBack(lastComplete.history);
    lastComplete = solve;
    completed += 1;
  }

  return {
    monitor(entry: MonitorLine, line: number): void {
      if (!isOutermost(entry.level)) return;
      let solve = current;
      if (solve?.last && isRepeat(solve.last, entry)) return;
      if (solve === null || solve.ended || (entry.iteration === 0 && solve.last !== null)) {
        const earlier = solve !== null;
        if (solve !== null && !solve.ended) unfinished += 1;
        solve = begin(line);
        if (entry.iteration !== 0) {
          solve.brokenAt = line;
          if (earlier) mixedAt ??= line;
        }
      } else if (solve.last !== null && entry.iteration !== solve.last.iteration + 1) {
        solve.brokenAt ??= line;
        if (entry.iteration <= solve.last.iteration) mixedAt ??= line;
      } else if (solve.last === null && entry.iteration !== 0) solve.brokenAt ??= line;
      continueWith(solve, entry, line);
    },
    reason(entry: ReasonLine, line: number): void {
      if (isNestedPrefix(entry.prefix) || !isOutermost(entry.level)) return;
      const previous = current;
      const stated = previous?.reason ?? null;
      if (stated !== null && stated.line === line - 1 && stated.name === entry.name && stated.iterations === entry.iterations) {
        // The very same line twice: the second may be a copy, so what the monitors said still belongs to it.
        repeatedReasons += 1;
        completed += 1;
        return;
      }
      const solve = previous === null || previous.ended ? begin(line) : previous;
      solve.reason = { ...entry, line };
      complete(solve);
    },
    setupFailure(name: string, line: number): void {
      if (current?.reason) current.setupFailure.state(name, line);
    },
    trueResidual(value: number, line: number): void {
      if (current?.ended) current.trueResidual.state(value, line);
    },
    view(view: SolverView): void {
      if (view.mixed) mixedAt ??= view.line;
      const solve = current;
      if (solve === null) pendingView = view;
      else solve.view = view;
    },
    get hasSolves() {
      return current !== null || pendingView !== null;
    },
    get current() {
      return current;
    },
    get lastComplete() {
      return lastComplete;
    },
    get loneView() {
      return pendingView;
    },
    get completed() {
      return completed;
    },
    get repeatedReasons() {
      return repeatedReasons;
    },
    get unfinished() {
      return unfinished;
    },
    get mixedAt() {
      return mixedAt;
    },
  };
}
export type SolveTracker = ReturnType<typeof createSolveTracker>;
