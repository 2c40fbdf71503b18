import { z } from "zod";
import { strategyIds } from "@/lib/shared/strategy-ids";

export const outcomes = ["converged", "stalled", "diverged", "out-of-memory", "over-time", "broken"] as const;
export type Outcome = (typeof outcomes)[number];

export const monitoredNorms = ["preconditioned", "unpreconditioned", "natural", "none"] as const;

const seconds = z.number().min(0, "Times can't be negative.").max(1e9);
const residual = z.number().min(0, "A residual can't be negative.").max(1e300);

/** Body of a run report. Times are wall seconds for one set-up and for one solve; memory is summed over the processes. */
export const runReportSchema = z
  .strictObject({
    strategy: z.enum([...strategyIds, "other"]),
    /** Name of a strategy that is not among ours; only with strategy "other". */
    strategyName: z.string().trim().min(1).max(120).optional(),
    outcome: z.enum(outcomes),
    /** Why it broke; only with outcome "broken". */
    reason: z.string().trim().min(1).max(400).optional(),
    iterations: z.int().min(0).max(1e9).nullable().optional(),
    setupSeconds: seconds.nullable().optional(),
    solveSeconds: seconds.nullable().optional(),
    peakMemoryGiB: z.number().min(0).max(1e9).nullable().optional(),
    cores: z.int().min(1).max(4_000_000).nullable().optional(),
    trueRelativeResidual: residual.nullable().optional(),
    monitoredRelativeResidual: residual.nullable().optional(),
    monitoredNorm: z.enum(monitoredNorms).nullable().optional(),
    parameters: z.record(z.string().max(80), z.union([z.number(), z.string().max(400)])).optional(),
    followedAdvice: z.boolean().nullable().optional(),
    note: z.string().max(4000).optional(),
    measuredAt: z.iso.datetime({ offset: true, message: "Give the time in ISO 8601, such as 2026-12-01T08:00:00Z." }).optional(),
  })
  .superRefine((run, context) => {
    if (run.strategy === "other" && run.strategyName === undefined) {
      context.addIssue({ code: "custom", path: ["strategyName"], message: "Name the strategy that was run." });
    }
    if (run.strategy !== "other" && run.strategyName !== undefined) {
      context.addIssue({ code: "custom", path: ["strategyName"], message: "A name goes with the strategy other only." });
    }
  });
export type RunReport = z.infer<typeof runReportSchema>;
