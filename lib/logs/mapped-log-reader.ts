import { createClaim, type Claim } from "@/lib/logs/claim";
import { removeTerminalCodes } from "@/lib/logs/clean-line";
import { createLineSplitter } from "@/lib/logs/line-splitter";
import type { LogReader, LogReaderOptions } from "@/lib/logs/log-reader";
import { mappedQuantities, type LogMapping, type MappedQuantity, type QuantitySource } from "@/lib/logs/mapping";
import { emptyParsedLog, type ParsedLog } from "@/lib/logs/parsed-log";
import { createProblemList } from "@/lib/logs/problem-list";
import { createResidualHistory } from "@/lib/logs/residual-history";
import { compilePattern } from "@/lib/logs/safe-pattern";
import { outcomes, type Outcome } from "@/lib/runs/run";

const lineLimit = 4_096;
/** About ten seconds of matching; beyond it the rest of the log is not read. */
const defaultStepBudget = 2_000_000_000;
const printedNumber = /^[+-]?(?:\d{1,30}(?:\.\d{0,30})?|\.\d{1,30})(?:[eEdD][+-]?\d{1,3})?$/;
const whole = new Set<MappedQuantity>(["iterations", "processes", "factorEntries"]);

type Extractor = { quantity: MappedQuantity; source: QuantitySource; extract: (line: string) => string | null; steps: () => number };

/**
 * Reads a log by a team's own mapping, line by line and in constant memory; same result as `createLogReader`. Lines are
 * read up to 4 096 characters. Matching is linear in the line (see safe-pattern) and bounded for the whole log by a
 * step budget, so the same log and mapping always give the same result.
 */
export function createMappedLogReader(mapping: LogMapping, options: LogReaderOptions & { stepBudget?: number } = {}): LogReader {
  const problems = createProblemList();
  const history = createResidualHistory(Math.max(4, options.historyLimit ?? 20_000));
  const stepBudget = options.stepBudget ?? defaultStepBudget;
  const extractors = mappedQuantities.flatMap((quantity) => {
    const source = mapping.quantities[quantity];
    return source === undefined ? [] : [createExtractor(quantity, source)];
  });
  const claims = new Map(extractors.map(({ quantity }) => [quantity, createClaim<number>()]));
  const latest = new Map<MappedQuantity, { value: number; line: number }>();
  const outcome = createClaim<Outcome>();
  let points = 0;
  let historyLine: number | null = null;
  let stoppedAt: number | null = null;

  const splitter = createLineSplitter((raw, lineNumber) => {
    if (stoppedAt !== null) return;
    const line = removeTerminalCodes(raw).slice(0, lineLimit);
    const found = new Map<MappedQuantity, number>();
    for (const { quantity, source, extract } of extractors) {
      const printed = extract(line);
      if (printed === null) continue;
      const value = toNumber(printed) * source.scale;
      if (isAcceptable(quantity, value)) found.set(quantity, value);
      else problems.add("warning", lineNumber, `${quantity}: "${printed.slice(0, 40)}" is no number that fits.`);
    }
    for (const [quantity, value] of found) take(quantity, value, lineNumber);
    addPoint(found, lineNumber);
    readOutcome(line, lineNumber);
    if (extractors.reduce((sum, { steps }) => sum + steps(), 0) > stepBudget) stoppedAt = lineNumber;
  });

  function take(quantity: MappedQuantity, value: number, line: number): void {
    claims.get(quantity)?.state(value, line);
    const keepFirst = mapping.quantities[quantity]?.take === "first";
    if (!keepFirst || !latest.has(quantity)) latest.set(quantity, { value, line });
  }

  function addPoint(found: ReadonlyMap<MappedQuantity, number>, line: number): void {
    const monitored = found.get("residual");
    if (monitored === undefined) return;
    historyLine ??= line;
    const trueNorm = found.get("trueResidual") ?? null;
    history.add({ iteration: points, level: 0, norm: null, monitored, trueNorm, trueRelative: null, rounded: false });
    points += 1;
  }

  function readOutcome(line: string, lineNumber: number): void {
    for (const name of outcomes) {
      const text = mapping.outcome?.[name];
      if (text !== undefined && line.includes(text)) outcome.state(name, lineNumber);
    }
  }

  return {
    push: (chunk) => splitter.push(chunk),
    finish() {
      const result = emptyParsedLog();
      result.linesRead = splitter.lineNumber;
      if (splitter.nulLine !== null) {
        problems.add("error", splitter.nulLine, "The file holds NUL bytes: it is binary, or text in UTF-16. Save the log as UTF-8 text and try again.");
        return { ...result, problems: problems.items() };
      }
      if (options.trustLastLine === true) splitter.emitRest();
      else if (splitter.rest().trim() !== "") problems.add("note", splitter.lineNumber + 1, "The last line has no end of line: it may be cut and is not read.");
      if (splitter.bytes === 0) problems.add("error", null, "The log is empty.");
      if (stoppedAt !== null) problems.add("error", stoppedAt, "The patterns take too long on this log; nothing was read behind this line.");
      else fill(result);
      return { ...result, problems: problems.items() };
    },
  };

  function fill(result: ParsedLog): void {
    for (const [quantity, claim] of claims) {
      if (quantity === "residual" || quantity === "trueResidual") continue;
      const value = chosen(quantity, claim);
      if (value === null) continue;
      result[quantity] = value.value;
      result.lines[quantity] = value.line;
    }
    result.residualHistory = history.points();
    result.historyStride = history.stride;
    if (historyLine !== null) result.lines["residualHistory"] = historyLine;
    if (outcome.contradictedAt !== null) problems.add("warning", outcome.contradictedAt, "Two different outcomes are stated; the outcome is left open.");
    if (outcome.value === null || outcome.line === null) return;
    result.outcome = outcome.value;
    result.lines["outcome"] = outcome.line;
  }

  function chosen(quantity: MappedQuantity, claim: Claim<number>): { value: number; line: number } | null {
    if (mapping.quantities[quantity]?.take !== "only") return latest.get(quantity) ?? null;
    if (claim.contradictedAt !== null) {
      problems.add("warning", claim.contradictedAt, `${quantity} is stated with different values; it is left open. Choose the first or the last.`);
    }
    return claim.value === null || claim.line === null ? null : { value: claim.value, line: claim.line };
  }
}

function createExtractor(quantity: MappedQuantity, source: QuantitySource): Extractor {
  if (source.by === "column") return { quantity, source, extract: (line) => columnOf(line, source), steps: () => 0 };
  const pattern = compilePattern(source.pattern, { ignoreCase: source.ignoreCase });
  return { quantity, source, extract: (line) => pattern.capture(line), steps: () => pattern.steps };
}

const delimiterSigns = { comma: ",", semicolon: ";", tab: "\t", bar: "|" } as const;

function columnOf(line: string, source: Extract<QuantitySource, { by: "column" }>): string | null {
  if (source.contains !== "" && !line.includes(source.contains)) return null;
  const cells = source.delimiter === "whitespace" ? line.trim().split(/\s+/) : line.split(delimiterSigns[source.delimiter]);
  const cell = cells[source.index - 1]?.trim();
  // Without a filter, headings and prose are simply not lines of the table.
  if (cell === undefined || cell === "") return null;
  return source.contains === "" && !printedNumber.test(cell) ? null : cell;
}

function toNumber(printed: string): number {
  const trimmed = printed.trim();
  return printedNumber.test(trimmed) ? Number(trimmed.replace(/[dD]/, "e")) : Number.NaN;
}

function isAcceptable(quantity: MappedQuantity, value: number): boolean {
  if (!Number.isFinite(value) || value < 0) return false;
  if (quantity === "processes" && value < 1) return false;
  return !whole.has(quantity) || Number.isSafeInteger(value);
}
