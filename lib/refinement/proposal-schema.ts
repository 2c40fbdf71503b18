import { z } from "zod";
import { rateSchema } from "@/lib/hit-rates/rates";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import { ruleSchema } from "@/rules/rule-schema";

export const proposalKinds = ["threshold", "factor", "switch-off", "new-rule"] as const;
export type ProposalKind = (typeof proposalKinds)[number];

/**
 * Values of the fact between which the record can't tell thresholds apart at the stated confidence. `openLow`, `openHigh`: the record ends
 * before the bound is found, and the end given is the record's smallest or largest value.
 */
export const thresholdIntervalSchema = z.object({
  low: z.number(),
  high: z.number(),
  openLow: z.boolean(),
  openHigh: z.boolean(),
  confidence: z.number(),
});
export type ThresholdInterval = z.infer<typeof thresholdIntervalSchema>;

const factValueSchema = z.union([z.number(), z.string(), z.boolean()]);

export const proposalChangeSchema = z.discriminatedUnion("kind", [
  z.object({
    kind: z.literal("threshold"),
    /** Place in the rule's condition, such as "all.0"; "" where the condition is the comparison. */
    path: z.string(),
    fact: z.string(),
    from: z.number(),
    to: z.number(),
    interval: thresholdIntervalSchema,
  }),
  z.object({ kind: z.literal("factor"), effect: z.int(), strategy: strategyIdSchema, from: z.number(), to: z.number() }),
  z.object({ kind: z.literal("switch-off") }),
  z.object({ kind: z.literal("new-rule"), fact: z.string(), value: factValueSchema, interval: thresholdIntervalSchema.nullable(), strategy: strategyIdSchema, factor: z.number() }),
]);
export type ProposalChange = z.infer<typeof proposalChangeSchema>;

const figuresSchema = z.object({ best: rateSchema, regret: z.number() });

export const proposalEvidenceSchema = z.object({
  /** Cases whose first choice it changes, by what their runs say: cost less, cost more or the same, not both compared. */
  casesFor: z.int(),
  casesAgainst: z.int(),
  casesUnknown: z.int(),
  /** Those with runs of both first choices, by number; `saves` is cost before over cost after. */
  cases: z.array(z.object({ caseId: z.string(), number: z.int(), before: strategyIdSchema, after: strategyIdSchema, saves: z.number() })),
  /** Hit rate and regret over the contested cases, each case judged by a candidate chosen without it. */
  heldOut: z.object({ folds: z.int(), cases: z.int(), before: figuresSchema, after: figuresSchema }),
  /** Corrected for all candidates searched. */
  pValue: z.number(),
});

export const proposalSchema = z.object({
  /** Stable name within one search. */
  key: z.string(),
  kind: z.enum(proposalKinds),
  ruleId: z.string(),
  change: proposalChangeSchema,
  /** The rule as it was; null for a new one. */
  formerRule: ruleSchema.nullable(),
  rule: ruleSchema,
  words: z.string(),
  evidence: proposalEvidenceSchema,
  /** Key of a stronger proposal that mends mostly the same cases: take one of the two. */
  sameCasesAs: z.string().nullable(),
});
export type Proposal = z.infer<typeof proposalSchema>;

export const proposalResultSchema = z.object({
  cases: z.int(),
  /** Cases a search can learn from, and the fewest it needs. */
  contestedCases: z.int(),
  leastContestedCases: z.int(),
  enough: z.boolean(),
  /** Candidates searched. */
  candidates: z.int(),
  /** Corrected probability up to which a candidate is proposed. */
  level: z.number(),
  text: z.string(),
  /** Largest held-out gain first. */
  proposals: z.array(proposalSchema),
});
export type ProposalResult = z.infer<typeof proposalResultSchema>;
