import { createClaim } from "@/lib/logs/claim";
import { isNestedPrefix, readReasonLine } from "@/lib/logs/converged-reasons";
import { FailureReader } from "@/lib/logs/failure-reader";
import { indentOf } from "@/lib/logs/clean-line";
import { keepString } from "@/lib/logs/keep-string";
import type { MonitorLine } from "@/lib/logs/monitor-line";
import { MumpsReader } from "@/lib/logs/mumps-reader";
import { OptionReader } from "@/lib/logs/option-reader";
import { PerformanceReader } from "@/lib/logs/performance-summary";
import type { HistoryPool } from "@/lib/logs/residual-history";
import { SolveTracker } from "@/lib/logs/solve-tracker";
import { readViewHeader, ViewBuilder } from "@/lib/logs/solver-view";
import { readPeakMemory, readStrategyLine, readTrueResidual } from "@/lib/logs/statement-lines";

const setupFailureLine = /^(?:PC failed|PCSETUP_FAILED|PC_FAILED) due to ([A-Z_]{4,40})$/;

/**
 * Everything one run of a program printed. A log may hold several programs one after the other; `startsNext` tells
 * when a line can only belong to the next one. A class, like its readers: a long log makes thousands, and methods written
 * into object literals would each be allocated as long-lived.
 */
export class ProgramRecord {
  readonly line: number;
  readonly tracker: SolveTracker;
  readonly performance = new PerformanceReader();
  readonly options = new OptionReader();
  readonly mumps = new MumpsReader();
  readonly failure = new FailureReader();
  readonly peakMemoryBytes = createClaim<number>();
  readonly strategyName = createClaim<string>();
  private view: ViewBuilder | null = null;
  private secondSummaryLine: number | null = null;

  constructor(histories: HistoryPool, line: number) {
    this.line = line;
    this.tracker = new SolveTracker(histories);
  }

  private closeView(): void {
    if (this.view !== null) this.tracker.view(this.view.finish());
    this.view = null;
  }

  private takeView(text: string, indent: number, lineNumber: number): boolean {
    if (this.view !== null) {
      if (text === "") return true;
      // PETSc indents by two; a line at an odd column comes from elsewhere (MUMPS flushes late), the tree goes on.
      if (indent > this.view.base && (indent - this.view.base) % 2 === 1) return false;
      if (this.view.take(text, indent, lineNumber)) return true;
      this.closeView();
    }
    if (text.charCodeAt(0) !== 75 || !text.startsWith("KSP Object:")) return false;
    const header = readViewHeader(text);
    if (header === null || isNestedPrefix(header.prefix)) return false;
    this.view = new ViewBuilder(text, indent, lineNumber);
    return true;
  }

  private takeStatement(text: string, whole: string, lineNumber: number): void {
    const first = text.charCodeAt(0);
    if (first === 76) {
      const reason = readReasonLine(whole);
      if (reason !== null) return this.tracker.reason(reason, lineNumber);
    }
    const setupFailure = first === 80 ? setupFailureLine.exec(text) : null;
    if (setupFailure?.[1] !== undefined) return this.tracker.setupFailure(keepString(setupFailure[1]), lineNumber);
    const residual = readTrueResidual(text);
    if (residual !== null) return this.tracker.trueResidual(residual, lineNumber);
    const bytes = first === 77 ? readPeakMemory(text) : null;
    if (bytes !== null) return this.peakMemoryBytes.state(bytes, lineNumber);
    const name = readStrategyLine(text);
    if (name !== null) return this.strategyName.state(name, lineNumber);
    if (this.options.take(text, lineNumber) || this.mumps.take(text, lineNumber)) return;
    this.failure.take(text, lineNumber);
  }

  /** Whether this line opens the output of another program: a solve after the summary that PETSc prints last. */
  startsNext(text: string): boolean {
    if (!this.performance.started) return false;
    return text.startsWith("Linear ") || text.startsWith("KSP Object:");
  }

  monitor(entry: MonitorLine, lineNumber: number): void {
    this.closeView();
    this.tracker.monitor(entry, lineNumber);
  }

  /** Takes any other line; `whole` has its indentation, `text` has not. */
  take(whole: string, lineNumber: number): void {
    const indent = indentOf(whole);
    const text = whole.slice(indent).trimEnd();
    if (this.performance.opens(text)) {
      this.closeView();
      if (this.performance.started) this.secondSummaryLine ??= lineNumber;
    }
    if (this.performance.reading || this.performance.opens(text)) {
      this.performance.take(text, lineNumber);
      // Errors of other ranks may be printed in the middle of anything.
      if (text.charCodeAt(0) === 91) this.failure.take(text, lineNumber);
      return;
    }
    if (this.takeView(text, indent, lineNumber) || text === "") return;
    this.takeStatement(text, whole, lineNumber);
  }

  /** Ends what is still open; call once behind the last line. */
  finish(): void {
    this.closeView();
  }

  get secondSummaryAt(): number | null {
    return this.secondSummaryLine;
  }

  /** Whether the log says anything about a solve here. */
  get speaks(): boolean {
    return this.tracker.hasSolves || this.failure.failure() !== null || this.performance.started || this.mumps.version !== null;
  }
}
