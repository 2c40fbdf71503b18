import { z } from "zod";

/** An 80 % range of a positive quantity: low <= median <= high, all finite. Unit given by the field's name. */
export const rangeSchema = z.object({ low: z.number(), median: z.number(), high: z.number() });
export type Range = z.infer<typeof rangeSchema>;

/** The range median * [1/spread, spread]; `spread` >= 1 is a factor. */
export function spreadRange(median: number, spread: number): Range {
  return { low: median / spread, median, high: median * spread };
}

/** Range multiplied by a positive number. */
export function scaleRange(range: Range, factor: number): Range {
  return { low: range.low * factor, median: range.median * factor, high: range.high * factor };
}
