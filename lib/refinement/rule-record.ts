import { z } from "zod";
import { judgeAll, type JudgedRecord } from "@/lib/hit-rates/filter";
import { rateOf, rateSchema } from "@/lib/hit-rates/rates";
import type { HitRateRecord } from "@/lib/hit-rates/record";
import { formatPercent } from "@/lib/shared/format";
import type { Rule, RuleSet } from "@/rules/rule-schema";

/** Days that count as recent. */
export const recentDays = 90;

/** From this many firings on, a rule whose preference never came first is called overruled. */
export const leastFirings = 5;

export const ruleStandings = ["active", "never-fires", "always-overruled", "off"] as const;
export type RuleStanding = (typeof ruleStandings)[number];

export const ruleRecordSchema = z.object({
  ruleId: z.string(),
  title: z.string(),
  /** Cases in whose advice it fired, and of these those whose first strategy was run. */
  fired: z.int(),
  followed: z.int(),
  /** Of the followed: the first strategy worked, with Wilson's 95 % interval, or did not. */
  right: rateSchema,
  wrong: z.int(),
  /** Of the followed, by the advised run's time: the last 90 days up to `asOf`, and all before. */
  recent: rateSchema,
  earlier: rateSchema,
  /** Recent minus earlier share of right; null while either has fewer than 5 cases. */
  drift: z.number().nullable(),
  driftText: z.string(),
  /** Firings whose first choice is one it disfavours, or none of those it favours; null for a rule that prefers nothing. */
  overruled: z.int().nullable(),
  standing: z.enum(ruleStandings),
});
export type RuleRecord = z.infer<typeof ruleRecordSchema>;

const leastCasesForDrift = 5;

/**
 * What came of each rule, in the edition's order: fired, followed, right and wrong by the definitions of the hit rates, over each case's judged
 * (else latest) advice. `asOf` is the moment that ends the recent days, ISO 8601; throws RangeError where it is no date.
 */
export function ruleRecords(records: readonly HitRateRecord[], ruleSet: RuleSet, asOf: string): RuleRecord[] {
  const end = Date.parse(asOf);
  if (Number.isNaN(end)) throw new RangeError(`${asOf} is no date.`);
  const judged = judgeAll(records);
  return ruleSet.map((rule) => ruleRecordOf(rule, judged.filter(({ record }) => record.advice.firedRules.includes(rule.id)), end));
}

function ruleRecordOf(rule: Rule, firings: readonly JudgedRecord[], end: number): RuleRecord {
  const followed = firings.flatMap(({ record, judgement }) => {
    if (judgement === null || record.advisedRun === null) return [];
    return [{ worked: judgement.worked, days: (end - Date.parse(record.advisedRun.measuredAt)) / 86_400_000 }];
  });
  const worked = (items: typeof followed) => rateOf(items.filter((item) => item.worked).length, items.length);
  const right = worked(followed);
  const recent = worked(followed.filter(({ days }) => days >= 0 && days < recentDays));
  const earlier = worked(followed.filter(({ days }) => days >= recentDays));
  const overruled = overruledIn(rule, firings);
  return {
    ruleId: rule.id,
    title: rule.title,
    fired: firings.length,
    followed: followed.length,
    right,
    wrong: right.n - right.x,
    recent,
    earlier,
    ...driftOf(recent, earlier),
    overruled,
    standing: standingOf(rule, firings.length, overruled),
  };
}

type Rate = RuleRecord["right"];

function driftOf(recent: Rate, earlier: Rate): Pick<RuleRecord, "drift" | "driftText"> {
  if (recent.n < leastCasesForDrift || earlier.n < leastCasesForDrift) {
    return { drift: null, driftText: `Too few cases to tell a drift: ${recent.n} in the last ${recentDays} days, ${earlier.n} before.` };
  }
  const drift = recent.x / recent.n - earlier.x / earlier.n;
  const shares = `${formatPercent(recent.x / recent.n)} in the last ${recentDays} days, ${formatPercent(earlier.x / earlier.n)} before`;
  const apart = recent.low > earlier.high || recent.high < earlier.low;
  const how = apart ? (drift > 0 ? "Getting better" : "Getting worse") : "No clear drift";
  return { drift, driftText: `${how}: right in ${shares}.` };
}

/** Firings whose first choice takes none of the rule's favours or takes one of its disfavours; effects of factor 1 say no preference. */
function overruledIn(rule: Rule, firings: readonly JudgedRecord[]): number | null {
  const named = (kind: "favour" | "disfavour") => rule.then.flatMap((effect) => (effect.kind === kind && effect.factor > 1 ? [effect.strategy] : []));
  const [favoured, disfavoured] = [named("favour"), named("disfavour")];
  if (favoured.length + disfavoured.length === 0) return null;
  return firings.filter(({ record }) => {
    const first = record.advice.firstStrategy;
    const isFirst = (strategy: string) => strategy === first;
    return disfavoured.some(isFirst) || (favoured.length > 0 && !favoured.some(isFirst));
  }).length;
}

function standingOf({ enabled }: Rule, fired: number, overruled: number | null): RuleStanding {
  if (!enabled) return "off";
  if (fired === 0) return "never-fires";
  return overruled === fired && fired >= leastFirings ? "always-overruled" : "active";
}
