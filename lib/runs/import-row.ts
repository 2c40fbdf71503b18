import { z } from "zod";
import { questionnaireSchema, type Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import type { FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { runReportSchema, type RunReport } from "./run";

/** A run with the case it belongs to: one that exists (UUID or number) or the answers of a new one. */
export type ImportRow = { run: RunReport; target: { kind: "case"; ref: string } | { kind: "questionnaire"; questionnaire: Questionnaire } };
export type RowResult = { row: ImportRow } | { errors: FieldError[] };

const caseIdSchema = z.union([z.uuid(), z.int().min(1).max(999_999_999).transform(String), z.string().regex(/^[1-9]\d{0,8}$/)], {
  error: "Give a case's UUID or its number.",
});
const looseRow = z.looseObject({ caseId: z.unknown().optional(), questionnaire: z.unknown().optional() });

/** One row of an import from parsed JSON; errors carry the row's own paths. */
export function parseImportRow(value: unknown): RowResult {
  const object = looseRow.safeParse(value);
  if (!object.success) return { errors: [{ path: "", message: "A row is a JSON object." }] };
  const { caseId, questionnaire, ...rest } = object.data;
  const run = runReportSchema.safeParse(rest);
  const target = parseTarget(caseId, questionnaire);
  const errors = [...(run.success ? [] : fieldErrorsOf(run.error)), ...("errors" in target ? target.errors : [])];
  return run.success && "kind" in target ? { row: { run: run.data, target } } : { errors };
}

function parseTarget(caseId: unknown, questionnaire: unknown): ImportRow["target"] | { errors: FieldError[] } {
  if ((caseId === undefined) === (questionnaire === undefined)) {
    return { errors: [{ path: "caseId", message: "A row names its case or gives a questionnaire, one of the two." }] };
  }
  if (caseId !== undefined) {
    const parsed = caseIdSchema.safeParse(caseId);
    return parsed.success ? { kind: "case", ref: parsed.data } : { errors: [{ path: "caseId", message: "Give a case's UUID or its number." }] };
  }
  const parsed = questionnaireSchema.safeParse(questionnaire);
  if (parsed.success) return { kind: "questionnaire", questionnaire: parsed.data };
  return { errors: fieldErrorsOf(parsed.error).map(({ path, message }) => ({ path: path === "" ? "questionnaire" : `questionnaire.${path}`, message })) };
}

const numberColumns = ["iterations", "setupSeconds", "solveSeconds", "peakMemoryGiB", "cores", "trueRelativeResidual", "monitoredRelativeResidual"] as const;
const textColumns = ["caseId", "strategy", "strategyName", "outcome", "reason", "monitoredNorm", "note", "measuredAt"] as const;
const jsonColumns = ["parameters", "questionnaire"] as const;
/** Columns a CSV import may have, in any order. */
export const importColumns: readonly string[] = [...textColumns, ...numberColumns, "followedAdvice", ...jsonColumns];

const numberColumnSet: ReadonlySet<string> = new Set(numberColumns);
const jsonColumnSet: ReadonlySet<string> = new Set(jsonColumns);

/** Problems of a CSV's header line; empty when it can be used. */
export function headerErrors(header: readonly string[]): FieldError[] {
  return header.flatMap((name, index) => {
    if (!importColumns.includes(name)) return [{ path: "header", message: `The column "${name.slice(0, 80)}" is not known; there are ${importColumns.join(", ")}.` }];
    return header.indexOf(name) < index ? [{ path: "header", message: `The column ${name} stands there twice.` }] : [];
  });
}

/** A CSV record as the JSON it stands for: empty cells are left out, numbers, yes or no, and JSON cells are read; what can't be read stays text. */
export function rowFromCells(header: readonly string[], cells: readonly string[]): Record<string, unknown> {
  const entries = header.flatMap((name, index): [string, unknown][] => {
    const cell = cells[index]?.trim() ?? "";
    return cell === "" ? [] : [[name, cellValue(name, cell)]];
  });
  return Object.fromEntries(entries);
}

function cellValue(name: string, cell: string): unknown {
  if (numberColumnSet.has(name)) return /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(cell) ? Number(cell) : cell;
  if (name === "followedAdvice" && (cell === "true" || cell === "false")) return cell === "true";
  if (!jsonColumnSet.has(name)) return cell;
  try {
    return JSON.parse(cell);
  } catch {
    return cell;
  }
}
