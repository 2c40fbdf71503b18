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
export class PerformanceReader {
  private place: "before" | "header" | "table" | "after" = "before";
  private stage = -1;
  private flopsRatioLine: number | null = null;
  readonly processes = createClaim<number>();
  private readonly totalSeconds = createClaim<number>();
  private readonly timeRatio = createClaim<number>();
  private readonly flopsRatio = createClaim<number>();
  readonly version = createClaim<string>();
  private readonly events = new Map<string, EventSum>();

  private readHeader(text: string, line: number): void {
    const started = startedBy.exec(text);
    if (started !== null && this.processes.line === null) this.processes.state(Number(started[1]), line);
    const release = /^Using Petsc (?:Release Version (\d+\.\d+\.\d+)|Development (?:GIT|HG) revision: (\S{1,60}))/.exec(text);
    if (release !== null) this.version.state(keepString(release[1] ?? release[2] ?? ""), line);
    const ratio = ratioRow.exec(text);
    if (ratio === null) return;
    if (text.startsWith("Time")) {
      this.totalSeconds.state(Number(ratio[1]), line);
      this.timeRatio.state(Number(ratio[2]), line);
    } else {
      this.flopsRatio.state(Number(ratio[2]), line);
      this.flopsRatioLine ??= line;
    }
  }

  private readEvent(text: string, line: number): void {
    if (!keptEvents.has(text.slice(0, text.indexOf(" ")))) return;
    const match = eventRow.exec(text);
    if (match === null) return;
    const [, piece = "", calls, seconds, printedRatio] = match;
    const ratio = Number(printedRatio);
    const timeRatioOfEvent = Number.isFinite(ratio) ? ratio : 0;
    const name = keepString(piece);
    const known = this.events.get(name);
    if (known === undefined) {
      this.events.set(name, { name, calls: Number(calls), seconds: Number(seconds), timeRatio: timeRatioOfEvent, line, ambiguous: false, stage: this.stage });
      return;
    }
    // Stages are printed one after the other: a row of an earlier one cannot come again.
    if (known.stage >= this.stage) {
      known.ambiguous = known.ambiguous || known.stage !== this.stage || known.calls !== Number(calls) || known.seconds !== Number(seconds);
      return;
    }
    known.stage = this.stage;
    known.calls += Number(calls);
    known.seconds += Number(seconds);
    known.timeRatio = Math.max(known.timeRatio, timeRatioOfEvent);
  }

  private readTable(text: string, line: number): void {
    const stageRow = /^--- Event Stage (\d{1,4}):/.exec(text);
    if (stageRow !== null) this.stage = Number(stageRow[1]);
    else if (/^(?:Object Type|Memory usage is given|====)/.test(text)) this.place = "after";
    else if (this.stage >= 0) this.readEvent(text, line);
  }

  /** Whether a line opens a summary. */
  opens(text: string): boolean {
    return text.charCodeAt(0) === 45 && text.includes(" PETSc Performance Summary: ");
  }

  take(text: string, line: number): void {
    if (this.place === "before") this.place = "header";
    else if (this.place === "header") {
      if (/^Event +Count +Time/.test(text)) this.place = "table";
      else this.readHeader(text, line);
    } else if (this.place === "table") this.readTable(text, line);
  }

  get reading(): boolean {
    return this.place === "header" || this.place === "table";
  }

  get started(): boolean {
    return this.place !== "before";
  }

  get tableComplete(): boolean {
    return this.place === "after";
  }

  /** An event summed over the stages; null when absent, ambiguous or when the table is not complete. */
  event(name: string): LoggedEvent | null {
    const found = this.events.get(name);
    if (this.place !== "after" || found === undefined || found.ambiguous) return null;
    return { name, calls: found.calls, seconds: found.seconds, timeRatio: found.timeRatio, line: found.line };
  }

  isAmbiguous(name: string): boolean {
    return this.events.get(name)?.ambiguous === true;
  }

  summary(): PerformanceSummary | null {
    if (this.place === "before") return null;
    const complete = this.place === "after" ? [...this.events.values()].filter((event) => !event.ambiguous) : [];
    return {
      totalSeconds: this.totalSeconds.value,
      timeRatio: this.timeRatio.value,
      flopsRatio: this.flopsRatio.value,
      flopsRatioLine: this.flopsRatioLine,
      events: complete.map(({ name, calls, seconds, timeRatio: ratio, line }) => ({ name, calls, seconds, timeRatio: ratio, line })),
    };
  }
}
