import { createClaim } from "@/lib/logs/claim";
import { keepString } from "@/lib/logs/keep-string";
import type { LoggedEvent, PerformanceSummary } from "@/lib/logs/parsed-log";

/** Events that say something of set-up, solve and balance; the others are passed over. */
const keptEvents = new Set([
  "KSPSetUp", "KSPSolve", "KSPGMRESOrthog", "PCSetUp", "PCSetUpOnBlocks", "PCApply", "MatMult", "MatSolve",
  "MatLUFactorSym", "MatLUFactorNum", "MatCholFctrSym", "MatCholFctrNum", "VecNorm", "VecDot", "VecMDot",
]);
const eventRow = /^([A-Za-z][\w+:-]{0,60}) +(\d{1,12}) +\d+\.\d +(\d\.\d{4}e[+-]\d{2,3}) +(\d+\.\d(?:e[+-]\d{2})?|inf|nan) /;
const startedBy = / with (\d{1,8}) process(?:or)?(?:s|\(es\))?,? by /;
const ratioRow = /^(?:Time \(sec\)|Flops?):\s+(\d\.\d{3,6}e[+-]\d{2,3})\s+(\d+\.\d{3,5})\s/;

type EventSum = LoggedEvent & { ambiguous: boolean; stage: number };

/** Reads the performance summary (`-log_view`, formerly `-log_summary`): header, totals, event table of every stage. */
export function createPerformanceReader() {
  let place: "before" | "header" | "table" | "after" = "before";
  let stage = -1;
  let flopsRatioLine: number | null = null;
  const processes = createClaim<number>();
  const totalSeconds = createClaim<number>();
  const timeRatio = createClaim<number>();
  const flopsRatio = createClaim<number>();
  const version = createClaim<string>();
  const events = new Map<string, EventSum>();

  function readHeader(text: string, line: number): void {
    const started = startedBy.exec(text);
    if (started !== null && processes.line === null) processes.state(Number(started[1]), line);
    const release = /^Using Petsc (?:Release Version (\d+\.\d+\.\d+)|Development (?:GIT|HG) revision: (\S{1,60}))/.exec(text);
    if (release !== null) version.state(keepString(release[1] ?? release[2] ?? ""), line);
    const ratio = ratioRow.exec(text);
    if (ratio === null) return;
    if (text.startsWith("Time")) {
      totalSeconds.state(Number(ratio[1]), line);
      timeRatio.state(Number(ratio[2]), line);
    } else {
      flopsRatio.state(Number(ratio[2]), line);
      flopsRatioLine ??= line;
    }
  }

  function readEvent(text: string, line: number): void {
    if (!keptEvents.has(text.slice(0, text.indexOf(" ")))) return;
    const match = eventRow.exec(text);
    if (match === null) return;
    const [, piece = "", calls, seconds, printedRatio] = match;
    const ratio = Number(printedRatio);
    const timeRatioOfEvent = Number.isFinite(ratio) ? ratio : 0;
    const name = keepString(piece);
    const known = events.get(name);
    if (known === undefined) {
      events.set(name, { name, calls: Number(calls), seconds: Number(seconds), timeRatio: timeRatioOfEvent, line, ambiguous: false, stage });
      return;
    }
    // Stages are printed one after the other: a row of an earlier one cannot come again.
    if (known.stage >= stage) {
      known.ambiguous = known.ambiguous || known.stage !== stage || known.calls !== Number(calls) || known.seconds !== Number(seconds);
      return;
    }
    known.stage = stage;
    known.calls += Number(calls);
    known.seconds += Number(seconds);
    known.timeRatio = Math.max(known.timeRatio, timeRatioOfEvent);
  }

  function readTable(text: string, line: number): void {
    const stageRow = /^--- Event Stage (\d{1,4}):/.exec(text);
    if (stageRow !== null) stage = Number(stageRow[1]);
    else if (/^(?:Object Type|Memory usage is given|====)/.test(text)) place = "after";
    else if (stage >= 0) readEvent(text, line);
  }

  return {
    /** Whether a line opens a summary. */
    opens: (text: string) => text.charCodeAt(0) === 45 && text.includes(" PETSc Performance Summary: "),
    take(text: string, line: number): void {
      if (place === "before") place = "header";
      else if (place === "header") {
        if (/^Event +Count +Time/.test(text)) place = "table";
        else readHeader(text, line);
      } else if (place === "table") readTable(text, line);
    },
    get reading() {
      return place === "header" || place === "table";
    },
    get started() {
      return place !== "before";
    },
    get tableComplete() {
      return place === "after";
    },
    processes,
    version,
    /** An event summed over the stages; null when absent, ambiguous or when the table is not complete. */
    event(name: string): LoggedEvent | null {
      const found = events.get(name);
      if (place !== "after" || found === undefined || found.ambiguous) return null;
      return { name, calls: found.calls, seconds: found.seconds, timeRatio: found.timeRatio, line: found.line };
    },
    isAmbiguous: (name: string) => events.get(name)?.ambiguous === true,
    summary(): PerformanceSummary | null {
      if (place === "before") return null;
      const complete = place === "after" ? [...events.values()].filter((event) => !event.ambiguous) : [];
      return {
        totalSeconds: totalSeconds.value,
        timeRatio: timeRatio.value,
        flopsRatio: flopsRatio.value,
        flopsRatioLine,
        events: complete.map(({ name, calls, seconds, timeRatio: ratio, line }) => ({ name, calls, seconds, timeRatio: ratio, line })),
      };
    },
  };
}
export type PerformanceReader = ReturnType<typeof createPerformanceReader>;
