import type { LogQuery } from "@/lib/api/contract/logs";
import type { LogProblem, ParsedLog } from "@/lib/logs/parsed-log";
import { runReportSchema, type RunReport } from "@/lib/runs/run";
import type { FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";

export type ReportFromLog =
  | { kind: "report"; report: RunReport; doubts: LogProblem[] }
  /** Log and corrections together don't say enough. */
  | { kind: "missing"; fields: FieldError[] }
  /** A correction can't be used. */
  | { kind: "refused"; fields: FieldError[] };

/**
 * The run report that a log and its corrections make. What the log does not say is left out; a correction stands over the log, and an empty
 * one takes a value back.
 */
export function reportFromLog(parsed: ParsedLog, given: LogQuery): ReportFromLog {
  const { record: _record, mapping: _mapping, outcomeIfSilent, coresIfSilent, fileName: _fileName, source: _source, ...corrections } = given;
  const outcome = corrections.outcome ?? parsed.outcome ?? outcomeIfSilent;
  const strategy = corrections.strategy ?? parsed.strategy;
  const missing: FieldError[] = [];
  if (strategy === null) missing.push({ path: "strategy", message: "The log does not show which strategy was run; name it with strategy=." });
  if (outcome === undefined) missing.push({ path: "outcome", message: "The log does not show how the solve ended; say it with outcome=." });
  if (missing.length > 0) return { kind: "missing", fields: missing };
  const cores = corrections.cores ?? parsed.processes ?? coresIfSilent;
  const said = { ...loggedValues(parsed), ...corrections, cores, strategy, outcome };
  const reason = corrections.reason ?? (outcome === "converged" || outcome !== parsed.outcome ? undefined : loggedReason(parsed));
  return check({ ...said, reason: reason === "" ? undefined : reason }, new Set(Object.keys(corrections)), doubtsOf(parsed, given));
}

function loggedValues(parsed: ParsedLog) {
  const { iterations, setupSeconds, solveSeconds, peakMemoryGiB, trueRelativeResidual, monitoredRelativeResidual, monitoredNorm } = parsed;
  // Cycles around an inner solve are not the iterations that a strategy is predicted to take; the sum of the inner ones is not printed.
  return { iterations: cyclesOnly(parsed) ? undefined : iterations, setupSeconds, solveSeconds, peakMemoryGiB, trueRelativeResidual, monitoredRelativeResidual, monitoredNorm };
}

function loggedReason({ reason, reasonText }: ParsedLog): string | undefined {
  const text = reasonText ?? reason;
  return text === null ? undefined : text.slice(0, 400).trim() || undefined;
}

/** Whether the counted iterations are cycles of an outer method around a whole inner solve. */
function cyclesOnly({ preconditioner }: Pick<ParsedLog, "preconditioner">): boolean {
  return preconditioner === "ksp";
}

function doubtsOf(parsed: ParsedLog, given: LogQuery): LogProblem[] {
  const doubts: LogProblem[] = [];
  const { strategy } = given;
  if (strategy !== undefined && parsed.strategy !== null && parsed.strategy !== strategy) {
    const text = `The log shows the strategy ${parsed.strategy}; the call says ${strategy}, and so it is recorded.`;
    doubts.push({ line: parsed.lines["strategy"] ?? null, severity: "warning", text });
  }
  if (cyclesOnly(parsed) && parsed.iterations !== null && given.iterations === undefined) {
    const text = "The iterations are cycles around an inner solve, not those of the strategy; they are not recorded.";
    doubts.push({ line: parsed.lines["iterations"] ?? null, severity: "note", text });
  }
  return doubts;
}

/** A logged value outside what a run can hold is left out and said; a given one is refused. */
function check(said: Record<string, unknown>, givenNames: ReadonlySet<string>, doubts: LogProblem[]): ReportFromLog {
  const present = Object.fromEntries(Object.entries(said).filter(([, value]) => value !== undefined));
  const parsed = runReportSchema.safeParse(present);
  if (parsed.success) return { kind: "report", report: parsed.data, doubts };
  const errors = fieldErrorsOf(parsed.error);
  const unusable = errors.filter(({ path }) => path in present && !givenNames.has(path) && path !== "strategy" && path !== "outcome");
  if (unusable.length === 0) return { kind: "refused", fields: errors };
  const dropped = unusable.map(({ path, message }): LogProblem => ({ line: null, severity: "warning", text: `${path} is not recorded: ${message}` }));
  const paths = new Set(unusable.map(({ path }) => path));
  return check(Object.fromEntries(Object.entries(present).filter(([name]) => !paths.has(name))), givenNames, [...doubts, ...dropped]);
}
