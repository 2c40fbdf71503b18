import { createClaim } from "@/lib/logs/claim";
import { isNestedPrefix, type ReasonLine } from "@/lib/logs/converged-reasons";
import type { MonitorLine } from "@/lib/logs/monitor-line";
import type { HistoryPool, ResidualHistory } from "@/lib/logs/residual-history";
import type { SolverView } from "@/lib/logs/solver-view";

/** One solve of the outermost solver, as far as the log shows it. */
export class Solve {
  readonly norm = createClaim<string>();
  readonly setupFailure = createClaim<string>();
  readonly trueResidual = createClaim<number>();
  readonly history: ResidualHistory;
  readonly line: number;
  /** Monitored norm of the first residual. */
  first = Number.NaN;
  last: MonitorLine | null = null;
  /** Line of the last residual. */
  lastLine: number;
  /** Line where the numbering of iterations stopped making sense. */
  brokenAt: number | null = null;
  nonFiniteAt: number | null = null;
  reason: (ReasonLine & { line: number }) | null = null;
  view: SolverView | null = null;
  ended = false;

  constructor(history: ResidualHistory, line: number) {
    this.history = history;
    this.line = line;
    this.lastLine = line;
  }
}

function isRepeat(last: MonitorLine, next: MonitorLine): boolean {
  const same = Object.is(last.monitored, next.monitored) && Object.is(last.trueRelative, next.trueRelative);
  return last.iteration === next.iteration && same;
}

/** Follows the solves of one program: which line belongs to which solve of the outermost solver. */
export class SolveTracker {
  private outerLevel: number | null = null;
  private currentSolve: Solve | null = null;
  private lastCompleteSolve: Solve | null = null;
  private pendingView: SolverView | null = null;
  private completedCount = 0;
  private repeatedReasonsCount = 0;
  private mixedLine: number | null = null;

  constructor(private readonly histories: HistoryPool) {}

  /** Whether a line of this depth is the outermost solver's; a shallower one discards what was taken for it. */
  private isOutermost(level: number): boolean {
    if (this.outerLevel !== null && level > this.outerLevel) return false;
    if (this.outerLevel !== null && level < this.outerLevel) {
      this.currentSolve = null;
      this.lastCompleteSolve = null;
      this.completedCount = 0;
      this.repeatedReasonsCount = 0;
      this.mixedLine = null;
    }
    this.outerLevel = level;
    return true;
  }

  private begin(line: number): Solve {
    if (this.currentSolve !== null && this.currentSolve !== this.lastCompleteSolve) this.histories.giveBack(this.currentSolve.history);
    const solve = new Solve(this.histories.take(), line);
    solve.view = this.pendingView;
    this.pendingView = null;
    this.currentSolve = solve;
    return solve;
  }

  private continueWith(solve: Solve, entry: MonitorLine, line: number): void {
    if (solve.last === null) solve.first = entry.monitored;
    solve.last = entry;
    solve.lastLine = line;
    if (entry.norm !== null) solve.norm.state(entry.norm, line);
    if (Number.isNaN(entry.monitored) && !entry.rounded) solve.nonFiniteAt ??= line;
    solve.history.add(entry);
  }

  private complete(solve: Solve): void {
    solve.ended = true;
    if (this.lastCompleteSolve !== null && this.lastCompleteSolve !== solve) this.histories.giveBack(this.lastCompleteSolve.history);
    this.lastCompleteSolve = solve;
    this.completedCount += 1;
  }

  monitor(entry: MonitorLine, line: number): void {
    if (!this.isOutermost(entry.level)) return;
    let solve = this.currentSolve;
    if (solve?.last && isRepeat(solve.last, entry)) return;
    if (solve === null || solve.ended || (entry.iteration === 0 && solve.last !== null)) {
      const earlier = solve !== null;
      solve = this.begin(line);
      if (entry.iteration !== 0) {
        solve.brokenAt = line;
        if (earlier) this.mixedLine ??= line;
      }
    } else if (solve.last !== null && entry.iteration !== solve.last.iteration + 1) {
      solve.brokenAt ??= line;
      if (entry.iteration <= solve.last.iteration) this.mixedLine ??= line;
    } else if (solve.last === null && entry.iteration !== 0) solve.brokenAt ??= line;
    this.continueWith(solve, entry, line);
  }

  reason(entry: ReasonLine, line: number): void {
    if (isNestedPrefix(entry.prefix) || !this.isOutermost(entry.level)) return;
    const previous = this.currentSolve;
    const stated = previous?.reason ?? null;
    if (stated !== null && stated.line === line - 1 && stated.name === entry.name && stated.iterations === entry.iterations) {
      // The very same line twice: the second may be a copy, so what the monitors said still belongs to it.
      this.repeatedReasonsCount += 1;
      this.completedCount += 1;
      return;
    }
    const solve = previous === null || previous.ended ? this.begin(line) : previous;
    solve.reason = { ...entry, line };
    this.complete(solve);
  }

  setupFailure(name: string, line: number): void {
    if (this.currentSolve?.reason) this.currentSolve.setupFailure.state(name, line);
  }

  trueResidual(value: number, line: number): void {
    if (this.currentSolve?.ended) this.currentSolve.trueResidual.state(value, line);
  }

  view(view: SolverView): void {
    if (view.mixed) this.mixedLine ??= view.line;
    const solve = this.currentSolve;
    if (solve === null) this.pendingView = view;
    else solve.view = view;
  }

  get hasSolves(): boolean {
    return this.currentSolve !== null || this.pendingView !== null;
  }

  get current(): Solve | null {
    return this.currentSolve;
  }

  get lastComplete(): Solve | null {
    return this.lastCompleteSolve;
  }

  /** A solver view without a solve. */
  get loneView(): SolverView | null {
    return this.pendingView;
  }

  get completed(): number {
    return this.completedCount;
  }

  /** Reasons that repeat the line before them. */
  get repeatedReasons(): number {
    return this.repeatedReasonsCount;
  }

  /** Line from which on the output of two solves is mixed, null if it is not. */
  get mixedAt(): number | null {
    return this.mixedLine;
  }
}
