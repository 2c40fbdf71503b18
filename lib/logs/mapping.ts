import { z } from "zod";
import { compilePattern, PatternError } from "@/lib/logs/safe-pattern";

/** Numbers a mapping can pick; `residual` and `trueResidual` fill the history, one point a line. */
export const mappedQuantities = [
  "iterations",
  "processes",
  "setupSeconds",
  "solveSeconds",
  "peakMemoryGiB",
  "trueRelativeResidual",
  "monitoredRelativeResidual",
  "factorEntries",
  "residual",
  "trueResidual",
] as const;
export type MappedQuantity = (typeof mappedQuantities)[number];

export const columnDelimiters = ["whitespace", "comma", "semicolon", "tab", "bar"] as const;

/** Which of several lines counts: `only` leaves the value open when they differ. */
export const mappingChoices = ["only", "first", "last"] as const;

const common = {
  take: z.enum(mappingChoices).default("only"),
  /** Multiplies what is printed, such as 0.001 for milliseconds or 1/1024 for MiB to GiB. */
  scale: z.number().positive().max(1e15).default(1),
};

function checkPattern(value: { pattern: string; ignoreCase: boolean }, context: z.RefinementCtx): void {
  try {
    compilePattern(value.pattern, { ignoreCase: value.ignoreCase });
  } catch (error) {
    if (!(error instanceof PatternError)) throw error;
    context.addIssue({ code: "custom", path: ["pattern"], message: `${error.message} (character ${error.position + 1})` });
  }
}

const patternSource = z
  .strictObject({
    by: z.literal("pattern"),
    /** Regular expression with one group around the number; the subset is described in pattern-syntax. */
    pattern: z.string().min(1, "Write a pattern.").max(400),
    ignoreCase: z.boolean().default(false),
    ...common,
  })
  .superRefine(checkPattern);

const columnSource = z.strictObject({
  by: z.literal("column"),
  delimiter: z.enum(columnDelimiters),
  /** 1 for the first column. */
  index: z.int().min(1).max(200),
  /** Only lines that hold this text are read; empty for all. */
  contains: z.string().max(200).default(""),
  ...common,
});

const outcomeSource = z.strictObject({
  /** Text whose presence in a line means that the run converged, and texts of the other outcomes. */
  converged: z.string().min(1).max(200).optional(),
  stalled: z.string().min(1).max(200).optional(),
  diverged: z.string().min(1).max(200).optional(),
  "out-of-memory": z.string().min(1).max(200).optional(),
  "over-time": z.string().min(1).max(200).optional(),
  broken: z.string().min(1).max(200).optional(),
});

export const quantitySourceSchema = z.discriminatedUnion("by", [patternSource, columnSource]);
export type QuantitySource = z.infer<typeof quantitySourceSchema>;

/** A team's own log format: where each quantity stands. Applied line by line. */
export const logMappingSchema = z.strictObject({
  name: z.string().trim().min(1, "Give the format a name.").max(80),
  quantities: z
    .partialRecord(z.enum(mappedQuantities), quantitySourceSchema)
    .refine((quantities) => Object.keys(quantities).length > 0, "Map at least one quantity."),
  outcome: outcomeSource.optional(),
});
export type LogMapping = z.infer<typeof logMappingSchema>;
