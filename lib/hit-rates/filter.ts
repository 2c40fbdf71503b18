import { z } from "zod";
import { discretisations, meshFamilies } from "@/lib/questionnaire/answer-sets";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import { judge, type HitRateRecord, type Judgement } from "./record";

/** How a case came out, as a filter: judged = its advice's first strategy was run; missed, beaten = judged but not worked, contested but not best. */
export const results = ["judged", "not-judged", "worked", "missed", "contested", "best", "beaten", "left-out"] as const;
export type Result = (typeof results)[number];

const day = z.iso.date("Give a day as YYYY-MM-DD.");

/** Which cases a figure speaks of. The same names stand in the address of /hit-rates and /cases. Days are UTC, both included. */
export const hitRateFilterSchema = z.strictObject({
  discretisation: z.enum(discretisations).optional(),
  meshFamily: z.enum(meshFamilies).optional(),
  degree: z.coerce.number().int().min(1).max(6).optional(),
  /** First strategy of the advice judged. */
  advised: strategyIdSchema.optional(),
  /** Edition of the advice judged. */
  edition: z.coerce.number().int().min(1).max(1e9).optional(),
  from: day.optional(),
  to: day.optional(),
});
export type HitRateFilter = z.output<typeof hitRateFilterSchema>;

/** A filter with what one group or one figure adds to it. */
export const drillDownSchema = hitRateFilterSchema.extend({
  month: z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, "Give a month as YYYY-MM.").optional(),
  /** Id of a rule that fired in the advice judged (or, while nothing is judged, in the latest). */
  rule: z.string().min(1).max(80).optional(),
  result: z.enum(results).optional(),
});
export type DrillDown = z.output<typeof drillDownSchema>;

export type JudgedRecord = { record: HitRateRecord; judgement: Judgement | null };

export function judgeAll(records: readonly HitRateRecord[]): JudgedRecord[] {
  return records.map((record) => ({ record, judgement: judge(record) }));
}

/** The records a filter lets through. Days and months are those of the advised run, so they keep judged cases only. */
export function selectRecords(judged: readonly JudgedRecord[], filter: DrillDown): JudgedRecord[] {
  return judged.filter((item) => matchesCase(item, filter) && matchesTime(item, filter) && matchesResult(item.judgement, filter.result));
}

function matchesCase({ record }: JudgedRecord, filter: DrillDown): boolean {
  return (
    (filter.discretisation === undefined || record.discretisation === filter.discretisation) &&
    (filter.meshFamily === undefined || record.meshFamily === filter.meshFamily) &&
    (filter.degree === undefined || record.degree === filter.degree) &&
    (filter.advised === undefined || record.advice.firstStrategy === filter.advised) &&
    (filter.edition === undefined || record.advice.editionNumber === filter.edition) &&
    (filter.rule === undefined || record.advice.firedRules.includes(filter.rule))
  );
}

function matchesTime({ record, judgement }: JudgedRecord, filter: DrillDown): boolean {
  if (filter.from === undefined && filter.to === undefined && filter.month === undefined) return true;
  if (judgement === null || record.advisedRun === null) return false;
  const measuredOn = record.advisedRun.measuredAt.slice(0, 10);
  return (
    (filter.from === undefined || measuredOn >= filter.from) &&
    (filter.to === undefined || measuredOn <= filter.to) &&
    (filter.month === undefined || judgement.month === filter.month)
  );
}

function matchesResult(judgement: Judgement | null, result: Result | undefined): boolean {
  if (result === undefined) return true;
  if (judgement === null) return result === "not-judged";
  const matches: Record<Result, boolean> = {
    judged: true,
    "not-judged": false,
    worked: judgement.worked,
    missed: !judgement.worked,
    contested: judgement.contest !== null,
    best: judgement.contest?.best === true,
    beaten: judgement.contest?.best === false,
    "left-out": judgement.leftOut,
  };
  return matches[result];
}
