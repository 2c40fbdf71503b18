import { z } from "zod";
import { ratesSchema } from "@/lib/hit-rates/rates";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";

/** `unknown`: the runs can't tell, because one of the two first choices has no compared run or both came out the same; `text` says which. */
export const verdicts = ["helped", "hurt", "unknown"] as const;
export type Verdict = (typeof verdicts)[number];

/** The exact McNemar test on cases where both first choices were measured. */
export const pairedTestSchema = z.object({
  n: z.int(),
  onlyBefore: z.int(),
  onlyAfter: z.int(),
  pValue: z.number(),
  /** What it means, in plain words. */
  text: z.string(),
});
export type PairedTest = z.infer<typeof pairedTestSchema>;

export const changedCaseSchema = z.object({
  caseId: z.string(),
  number: z.int(),
  before: strategyIdSchema.nullable(),
  after: strategyIdSchema.nullable(),
  verdict: z.enum(verdicts),
  /** Total time after over before, below 1 faster, failed runs at their penalty; null where not both were compared. */
  timeRatio: z.number().nullable(),
  text: z.string(),
  /** Ids of the rules whose effects on the two first choices differ in the new one's favour, strongest first. */
  rules: z.array(z.string()),
});
export type ChangedCase = z.infer<typeof changedCaseSchema>;

export const replayResultSchema = z.object({
  /** Cases replayed. */
  cases: z.int(),
  /** Cases whose first choice was run: by the live edition's, by the draft's, by both. */
  judged: z.object({ before: z.int(), after: z.int(), both: z.int() }),
  /** Cases where both first choices entered a contest: those of best, regret and gap closed. */
  contested: z.int(),
  /** Rates on the same cases: worked where both were judged, the others where both were contested. */
  before: ratesSchema,
  after: ratesSchema,
  tests: z.object({ worked: pairedTestSchema, best: pairedTestSchema }),
  changed: z.object({ cases: z.int(), helped: z.int(), hurt: z.int(), unknown: z.int() }),
  /** Every case whose first choice changes, by case number. */
  changes: z.array(changedCaseSchema),
});
export type ReplayResult = z.infer<typeof replayResultSchema>;
