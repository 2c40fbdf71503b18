import { assembleLog } from "@/lib/logs/assemble-log";
import { mayCarryLabel, removeLabel, removeTerminalCodes } from "@/lib/logs/clean-line";
import { createLineSplitter } from "@/lib/logs/line-splitter";
import { readMonitorLine } from "@/lib/logs/monitor-line";
import { emptyParsedLog, type ParsedLog } from "@/lib/logs/parsed-log";
import { createProblemList } from "@/lib/logs/problem-list";
import { createHistoryPool } from "@/lib/logs/residual-history";
import { ProgramRecord } from "@/lib/logs/program-record";

export type LogReaderOptions = {
  /** Residuals kept of one solve; beyond it every n-th. Default 20 000. */
  historyLimit?: number;
  /**
   * Whether text behind the last end of line is read. Off by default: a log cut in the middle of a number would give
   * a wrong one. Switch it on for text that is known to be whole.
   */
  trustLastLine?: boolean;
};

export type LogReader = { push(chunk: Uint8Array): void; finish(): ParsedLog };

const numberPart = /^[0-9.eE+-]{1,24}(?= |$)/;
const monitorStart = /^\d{1,9} (?:KSP|SNES|TS) /;

/**
 * Reads a solver's text log as it streams in, in constant memory: residual monitors, converged reason, solver view,
 * performance summary, memory view, unused options and errors of PETSc (3.1 onwards), and MUMPS' own statistics.
 *
 * Tolerates CRLF, colour codes, time stamps and rank labels before the lines, several programs or solves in one file
 * (the last complete solve is reported). What the log does not say, or says in two ways, is null; doubts are listed
 * as problems with their line. Never throws on any input.
 */
export function createLogReader(options: LogReaderOptions = {}): LogReader {
  const historyLimit = Math.max(4, options.historyLimit ?? 20_000);
  const problems = createProblemList();
  const programs = createProgramQueue(historyLimit);
  let held: string | null = null;
  let heldNumber = 0;
  let longest = 0;
  let previous = "";
  let repeatedLines = 0;
  let otherRankAt: number | null = null;

  const splitter = createLineSplitter((raw, lineNumber) => {
    const line = raw.charCodeAt(raw.length - 1) === 13 || raw.includes("\u001b") || raw.includes("\r") ? removeTerminalCodes(raw) : raw;
    if (held !== null) {
      if (continuesNumber(held, line, longest)) {
        problems.add("warning", heldNumber, "Lines are wrapped in the middle of numbers; those numbers are not read.");
      } else handle(held, heldNumber);
      if (held.length > longest) longest = held.length;
    }
    // A monitor begins with its iteration or a space; a byte order mark only opens the file.
    held = lineNumber === 1 && line.startsWith("\u00ef\u00bb\u00bf") ? line.slice(3) : line;
    heldNumber = lineNumber;
  });

  function handle(line: string, lineNumber: number): void {
    if (line.length === 0) return;
    if (line === previous) {
      repeatedLines += 1;
      if (!line.includes("Linear ")) return;
    }
    previous = line;
    if (takeMonitor(line, lineNumber)) return;
    let text = line;
    if (mayCarryLabel(line)) {
      const label = removeLabel(line);
      text = label.text;
      if (label.rank !== null && label.rank > 0) return takeOtherRank(label.unstamped, text, lineNumber);
      if (text !== line && takeMonitor(text, lineNumber)) return;
      // Call stacks of errors carry a rank too; the reader of errors wants it.
      if (/^\[\d+\]/.test(label.unstamped) && !text.startsWith("[")) programs.current().failure.take(label.unstamped, lineNumber);
    }
    programs.forLine(text, lineNumber).take(text, lineNumber);
  }

  function takeMonitor(text: string, lineNumber: number): boolean {
    const entry = readMonitorLine(text);
    if (entry === null) return false;
    programs.forMonitor(lineNumber).monitor(entry, lineNumber);
    return true;
  }

  function takeOtherRank(line: string, text: string, lineNumber: number): void {
    if (programs.current().failure.take(line, lineNumber)) return;
    if (readMonitorLine(text) !== null || /^(?:Linear |KSP Object:)/.test(text)) otherRankAt ??= lineNumber;
  }

  return {
    push: (chunk) => splitter.push(chunk),
    finish() {
      if (splitter.nulLine !== null) return refuse(splitter.nulLine);
      const rest = splitter.rest();
      if (rest.trim().length > 0) {
        if (options.trustLastLine === true) splitter.emitRest();
        else problems.add("note", splitter.lineNumber + 1, "The last line has no end of line: it may be cut and is not read.");
      }
      if (held !== null) handle(held, heldNumber);
      held = null;
      if (splitter.bytes === 0) problems.add("error", null, "The log is empty.");
      if (splitter.cutLines > 0) problems.add("note", null, `${splitter.cutLines} lines are longer than 16 384 characters; their ends are not read.`);
      if (otherRankAt !== null) problems.add("warning", otherRankAt, "Several ranks print solves of their own; only rank 0 is read.");
      const doubled = repeatedLines > 0.3 * splitter.lineNumber;
      if (doubled) problems.add("note", null, "Every line seems to be printed twice; copies are left out.");
      return assembleLog({ programs: programs.finish(), problems, linesRead: splitter.lineNumber, doubled });
    },
  };

  function refuse(nulLine: number): ParsedLog {
    const text = "The file holds NUL bytes: it is binary, or text in UTF-16. Save the log as UTF-8 text and try again.";
    return { ...emptyParsedLog(), linesRead: splitter.lineNumber, problems: [{ line: nulLine, text, severity: "error" }] };
  }
}

/**
 * Whether `next` continues a number that a terminal or an editor wrapped at the end of `line`. Only the longest lines
 * of a log can have been wrapped.
 */
function continuesNumber(line: string, next: string, longest: number): boolean {
  if (line.length < longest || line.length < 20) return false;
  const code = next.charCodeAt(0);
  const mayContinue = (code >= 48 && code <= 57) || code === 46 || code === 43 || code === 45 || code === 69 || code === 101;
  if (!mayContinue || !/[0-9.eE+-]$/.test(line)) return false;
  return numberPart.test(next) && !monitorStart.test(next);
}

/** The programs of a log in order; only the one being read and the last with a complete solve are kept. */
function createProgramQueue(historyLimit: number) {
  const histories = createHistoryPool(historyLimit);
  let current = new ProgramRecord(histories, 1);
  let best: ProgramRecord | null = null;
  let solvesBefore = 0;
  let solvesOpen = false;

  function next(line: number): void {
    current.finish();
    if (current.tracker.lastComplete !== null) {
      if (best?.tracker.lastComplete) histories.giveBack(best.tracker.lastComplete.history);
      best = current;
    }
    solvesBefore += current.tracker.completed;
    solvesOpen = solvesOpen || current.tracker.mixedAt !== null;
    current = new ProgramRecord(histories, line);
  }

  return {
    current: () => current,
    forMonitor(line: number): ProgramRecord {
      if (current.performance.started && !current.performance.reading) next(line);
      return current;
    },
    forLine(text: string, line: number): ProgramRecord {
      if (current.performance.started && current.startsNext(text)) next(line);
      return current;
    },
    finish() {
      current.finish();
      const chosen = current.tracker.lastComplete !== null || best === null ? current : best;
      const later = chosen !== current && current.speaks ? current.line : null;
      return { chosen, later, solves: solvesOpen ? null : solvesBefore + current.tracker.completed };
    },
  };
}
export type ProgramQueueResult = ReturnType<ReturnType<typeof createProgramQueue>["finish"]>;
