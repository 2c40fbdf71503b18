import { createClaim } from "@/lib/logs/claim";
import { isNestedPrefix, readReasonLine } from "@/lib/logs/converged-reasons";
import { createFailureReader } from "@/lib/logs/failure-reader";
import { indentOf } from "@/lib/logs/clean-line";
import { keepString } from "@/lib/logs/keep-string";
import type { MonitorLine } from "@/lib/logs/monitor-line";
import { createMumpsReader } from "@/lib/logs/mumps-reader";
import { createOptionReader } from "@/lib/logs/option-reader";
import { createPerformanceReader } from "@/lib/logs/performance-summary";
import type { HistoryPool } from "@/lib/logs/residual-history";
import { createSolveTracker } from "@/lib/logs/solve-tracker";
import { createViewBuilder, readViewHeader, type ViewBuilder } from "@/lib/logs/solver-view";
import { readPeakMemory, readStrategyLine, readTrueResidual } from "@/lib/logs/statement-lines";

const setupFailureLine = /^(?:PC failed|PCSETUP_FAILED|PC_FAILED) due to ([A-Z_]{4,40})$/;

/**
 * Everything one run of a program printed. A log may hold several programs one after the other; `startsNext` tells
 * when a line can only belong to the next one.
 */
export function createProgramRecord(histories: HistoryPool, line: number) {
  const tracker = createSolveTracker(histories);
  const performance = createPerformanceReader();
  const options = createOptionReader();
  const mumps = createMumpsReader();
  const failure = createFailureReader();
  const peakMemoryBytes = createClaim<number>();
  const strategyName = createClaim<string>();
  let view: ViewBuilder | null = null;
  let secondSummaryAt: number | null = null;

  function closeView(): void {
    if (view !== null) tracker.view(view.finish());
    view = null;
  }

  function takeView(text: string, indent: number, lineNumber: number): boolean {
    if (view !== null) {
      if (text === "") return true;
      // PETSc indents by two; a line at an odd column comes from elsewhere (MUMPS flushes late), the tree goes on.
      if (indent > view.base && (indent - view.base) % 2 === 1) return false;
      if (view.take(text, indent, lineNumber)) return true;
      closeView();
    }
    if (text.charCodeAt(0) !== 75 || !text.startsWith("KSP Object:")) return false;
    const header = readViewHeader(text);
    if (header === null || isNestedPrefix(header.prefix)) return false;
    view = createViewBuilder(text, indent, lineNumber);
    return true;
  }

  function takeStatement(text: string, whole: string, lineNumber: number): void {
    const first = text.charCodeAt(0);
    if (first === 76) {
      const reason = readReasonLine(whole);
      if (reason !== null) return tracker.reason(reason, lineNumber);
    }
    const setupFailure = first === 80 ? setupFailureLine.exec(text) : null;
    if (setupFailure?.[1] !== undefined) return tracker.setupFailure(keepString(setupFailure[1]), lineNumber);
    const residual = readTrueResidual(text);
    if (residual !== null) return tracker.trueResidual(residual, lineNumber);
    const bytes = first === 77 ? readPeakMemory(text) : null;
    if (bytes !== null) return peakMemoryBytes.state(bytes, lineNumber);
    const name = readStrategyLine(text);
    if (name !== null) return strategyName.state(name, lineNumber);
    if (options.take(text, lineNumber) || mumps.take(text, lineNumber)) return;
    failure.take(text, lineNumber);
  }

  return {
    line,
    tracker,
    performance,
    options,
    mumps,
    failure,
    peakMemoryBytes,
    strategyName,
    /** Whether this line opens the output of another program: a solve after the summary that PETSc prints last. */
    startsNext(text: string): boolean {
      if (!performance.started) return false;
      return text.startsWith("Linear ") || text.startsWith("KSP Object:");
    },
    monitor(entry: MonitorLine, lineNumber: number): void {
      closeView();
      tracker.monitor(entry, lineNumber);
    },
    /** Takes any other line; `whole` has its indentation, `text` has not. */
    take(whole: string, lineNumber: number): void {
      const indent = indentOf(whole);
      const text = whole.slice(indent).trimEnd();
      if (performance.opens(text)) {
        closeView();
        if (performance.started) secondSummaryAt ??= lineNumber;
      }
      if (performance.reading || performance.opens(text)) {
        performance.take(text, lineNumber);
        // Errors of other ranks may be printed in the middle of anything.
        if (text.charCodeAt(0) === 91) failure.take(text, lineNumber);
        return;
      }
      if (takeView(text, indent, lineNumber) || text === "") return;
      takeStatement(text, whole, lineNumber);
    },
    finish: closeView,
    get secondSummaryAt() {
      return secondSummaryAt;
    },
    /** Whether the log says anything about a solve here. */
    get speaks() {
      return tracker.hasSolves || failure.failure() !== null || performance.started || mumps.version !== null;
    },
  };
}
export type ProgramRecord = ReturnType<typeof createProgramRecord>;
