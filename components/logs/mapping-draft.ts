import type { z } from "zod";
import { createMappedLogReader } from "@/lib/logs/mapped-log-reader";
import { logMappingSchema, type columnDelimiters, type LogMapping, type MappedQuantity, type mappingChoices } from "@/lib/logs/mapping";
import type { ParsedLog } from "@/lib/logs/parsed-log";
import type { FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";

/** One quantity of a log format as it is typed. */
export type MappingRow = {
  quantity: MappedQuantity;
  by: "pattern" | "column";
  pattern: string;
  delimiter: (typeof columnDelimiters)[number];
  index: string;
  contains: string;
  take: (typeof mappingChoices)[number];
  scale: string;
};

export type MappingDraft = { name: string; rows: MappingRow[]; converged: string; failed: string };

export function emptyRow(quantity: MappedQuantity): MappingRow {
  return { quantity, by: "pattern", pattern: "", delimiter: "whitespace", index: "1", contains: "", take: "last", scale: "1" };
}

export const emptyDraft: MappingDraft = { name: "", rows: [emptyRow("iterations")], converged: "", failed: "" };

/** Matching on the sample stops after so many steps, so that typing never stalls. */
const sampleSteps = 20_000_000;

export type TriedMapping = { mapping: LogMapping; parsed: ParsedLog } | { errors: FieldError[] };

/** A draft checked and tried on a sample of the log; errors carry the quantity's name in their path. */
export function tryMapping(draft: MappingDraft, sample: string): TriedMapping {
  const checked = logMappingSchema.safeParse(mappingOf(draft));
  if (!checked.success) return { errors: fieldErrorsOf(checked.error) };
  const reader = createMappedLogReader(checked.data, { stepBudget: sampleSteps, trustLastLine: true, historyLimit: 500 });
  reader.push(new TextEncoder().encode(sample));
  return { mapping: checked.data, parsed: reader.finish() };
}

function mappingOf({ name, rows, converged, failed }: MappingDraft): z.input<typeof logMappingSchema> {
  const quantities = Object.fromEntries(
    rows.map(({ quantity, by, pattern, delimiter, index, contains, take, scale }) => {
      const common = { take, scale: Number(scale) };
      return [quantity, by === "pattern" ? { by, pattern, ...common } : { by, delimiter, index: Number(index), contains, ...common }];
    }),
  );
  const outcome = { ...(converged === "" ? {} : { converged }), ...(failed === "" ? {} : { diverged: failed }) };
  return { name, quantities, ...(Object.keys(outcome).length === 0 ? {} : { outcome }) };
}
