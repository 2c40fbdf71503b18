import { z } from "zod";
import { rangeSchema } from "@/lib/shared/range";

/** One step of the reasoning behind a number, so that a reader can check it by hand. */
export const whyStepSchema = z.object({
  quantity: z.string(),
  formula: z.string(),
  inputs: z.array(z.object({ name: z.string(), value: z.union([z.number(), z.string()]), unit: z.string() })),
  value: z.number(),
  unit: z.string(),
  source: z.string(),
});
export type WhyStep = z.infer<typeof whyStepSchema>;

/** Where an estimate's range comes from: residuals on measured runs, or published theory alone (wider). */
export const estimateBases = ["reference-runs", "theory-only"] as const;

/** Prediction for one strategy on one case. Times are wall seconds; memory is summed over all processes, GiB. */
export const estimateSchema = z.object({
  iterations: rangeSchema,
  /** Proven upper bound on the iterations in the monitored norm, null where no theory applies. */
  iterationBound: z.number().nullable(),
  memoryGiB: rangeSchema,
  setupSeconds: rangeSchema,
  solveSeconds: rangeSchema,
  /** set-up + repeatedSolves x solve */
  totalSeconds: rangeSchema,
  factorEntries: z.number().nullable(),
  factorFlops: z.number().nullable(),
  /** Spectral interval of diag(A)^-1 A where the estimate uses one. */
  spectralInterval: z.tuple([z.number(), z.number()]).nullable(),
  basis: z.enum(estimateBases),
  parameters: z.record(z.string(), z.union([z.number(), z.string()])),
  notes: z.array(z.string()),
  why: z.array(whyStepSchema),
});
export type Estimate = z.infer<typeof estimateSchema>;
