import { z } from "zod";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import { estimateSchema } from "@/lib/estimates/estimate";
import { sizesSchema } from "@/lib/sizes/sizes";
import { ruleSourceSchema } from "@/rules/rule-schema";

export const rankingStatuses = ["ranked", "infeasible", "unavailable", "excluded"] as const;

/** One factor of the chain model -> rules -> evidence, in relative time: above 1 slower, below 1 faster. */
export const factorSchema = z.object({
  kind: z.enum(["rule", "evidence", "priority"]),
  rule: z.string().nullable(),
  factor: z.number(),
  text: z.string(),
  source: ruleSourceSchema.nullable(),
});
export type Factor = z.infer<typeof factorSchema>;

export const rankingEntrySchema = z.object({
  rank: z.int(),
  strategy: strategyIdSchema,
  status: z.enum(rankingStatuses),
  /** Why it stands below the line; null for ranked ones. */
  reason: z.string().nullable(),
  /** Score over the first's; null below the line. */
  relativeTime: z.number().nullable(),
  relativeRange: z.object({ low: z.number(), high: z.number() }).nullable(),
  parameters: z.record(z.string(), z.union([z.number(), z.string()])),
  estimate: estimateSchema,
  factors: z.array(factorSchema),
  cautions: z.array(z.string()),
  fallback: z.object({ strategy: strategyIdSchema, when: z.string() }).nullable(),
  /** Recorded runs that speak in the evidence factor. */
  evidenceRuns: z.int(),
});
export type RankingEntry = z.infer<typeof rankingEntrySchema>;

export const nearestCaseSchema = z.object({
  id: z.string(),
  number: z.int(),
  title: z.string(),
  distance: z.number(),
  bestStrategy: z.string().nullable(),
  text: z.string(),
});
export type NearestCase = z.infer<typeof nearestCaseSchema>;

/** The ranked strategies of a case under one edition; frozen once given. */
export const adviceSchema = z.object({
  edition: z.object({ number: z.int() }),
  modelVersion: z.string(),
  evidence: z.object({ asOf: z.string(), runs: z.int() }),
  sizes: sizesSchema,
  ranking: z.array(rankingEntrySchema),
  /** Ids of the rules that fired, in the edition's order. */
  firedRules: z.array(z.string()),
  cautions: z.array(z.string()),
  nearestCases: z.array(nearestCaseSchema),
});
export type Advice = z.infer<typeof adviceSchema>;
