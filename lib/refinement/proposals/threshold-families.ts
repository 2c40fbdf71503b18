import { formatNumber } from "@/lib/shared/format";
import { describeCondition, describeValue } from "@/rules/describe";
import { findFact } from "@/rules/facts";
import type { Comparison, Rule } from "@/rules/rule-schema";
import { forceOf } from "../first-choices";
import { comparisonsOf, replaceAt } from "./condition-paths";
import type { Family } from "./family";
import { isOrdering, thresholdBetween, type OrderingOperator } from "./nice-value";
import { firstsWith, lossOf, type SearchRecord } from "./search-record";
import { thresholdInterval } from "./threshold-interval";
import { walkOf, type Step, type Walk } from "./walk";

type Threshold = { rule: Rule; path: readonly string[]; comparison: Comparison; operator: OrderingOperator; from: number };

/** One family for each number that an ordering of an enabled rule compares with: the threshold moved up or down over the recorded values. */
export function thresholdFamilies(record: SearchRecord): Family[] {
  return record.live.ruleSet.flatMap((rule, at) => (rule.enabled ? thresholdsOf(rule).flatMap((threshold) => familyOf(record, at, threshold) ?? []) : []));
}

function thresholdsOf(rule: Rule): Threshold[] {
  return comparisonsOf(rule.when).flatMap(({ path, comparison }) => {
    const { operator, value } = comparison;
    return isOrdering(operator) && typeof value === "number" ? [{ rule, path, comparison, operator, from: value }] : [];
  });
}

/** A contested case whose first choice hangs on the comparison. `gainAbove`: ln cost saved if it comes to lie above the threshold. */
export type HangingCase = { index: number; value: number; above: boolean; firstAbove: number; firstBelow: number; gainAbove: number | null };

function familyOf(record: SearchRecord, at: number, threshold: Threshold): Family | null {
  const values = record.prepared.valuesOf(threshold.comparison.fact);
  const hanging = hangingCases(record, at, threshold, values);
  // Cases above the threshold change when it rises past them, those below when it falls, each nearest first.
  const rising = stepsOf(hanging.filter(({ above }) => above));
  const falling = stepsOf(hanging.filter(({ above }) => !above).reverse());
  const recorded = values.filter((value) => typeof value === "number").toSorted((a, b) => a - b);
  const bounds = [rising, falling].map((steps, side) => boundsOf(steps, recorded, side === 0));
  const walks: Walk[] = [];
  const boundsOfWalk: Bounds[] = [];
  [rising, falling].forEach((steps, side) => {
    const known = bounds[side] ?? new Map();
    const walk = walkOf(record, steps.map((step) => (step.tag !== null && known.has(step.tag) ? step : { ...step, tag: null })));
    if (walk === null) return;
    walks.push(walk);
    boundsOfWalk.push(known);
  });
  if (walks.length === 0) return null;
  const path = threshold.path.join(".");
  return {
    key: `threshold:${threshold.rule.id}:${path}`,
    kind: "threshold",
    walks,
    changeOf: ({ walk, tag }) => changeOf(threshold, path, boundsOfWalk[walk]?.get(tag) ?? { below: tag, above: tag }, hanging, recorded),
  };
}

function hangingCases(record: SearchRecord, at: number, { rule, path, comparison, operator }: Threshold, values: readonly unknown[]): HangingCase[] {
  const forced = (holds: boolean) => record.prepared.truthsOf(replaceAt(rule.when, path, holds ? { all: [] } : { any: [] }));
  const truths = record.prepared.truthsOf(comparison);
  const whenTrue = firstsWith(record, at, forceOf(rule), forced(true));
  const whenFalse = firstsWith(record, at, forceOf(rule), forced(false));
  const holdsAbove = operator === "greaterThan" || operator === "greaterThanInclusive";
  const found = record.rows.flatMap((row, index): HangingCase[] => {
    const value = values[row];
    const [first, other] = [whenTrue[index] ?? -1, whenFalse[index] ?? -1];
    if (typeof value !== "number" || first === other) return [];
    // "Above the threshold" is where a comparison of the "greater" kind holds; each case flips when the threshold passes it.
    const [firstAbove, firstBelow] = holdsAbove ? [first, other] : [other, first];
    const gain = lossOf(record, index, firstBelow) - lossOf(record, index, firstAbove);
    return [{ index, value, above: (truths[row] === 2) === holdsAbove, firstAbove, firstBelow, gainAbove: Number.isNaN(gain) ? null : gain }];
  });
  return found.sort((a, b) => a.value - b.value);
}

/** A group of equal values ends a candidate, named by its value. */
function stepsOf(hanging: readonly HangingCase[]): Step[] {
  return hanging.map(({ index, value, above, firstAbove, firstBelow }, position) => ({
    index,
    after: above ? firstBelow : firstAbove,
    tag: hanging[position + 1]?.value === value ? null : value,
  }));
}

type Bounds = ReadonlyMap<number, { below: number; above: number }>;

/** The recorded values between which the threshold then lies: up to the next case that hangs on it, else the next recorded one; absent past the record's end. */
function boundsOf(steps: readonly Step[], recorded: readonly number[], rising: boolean): Bounds {
  const ends = steps.flatMap(({ tag }) => (tag === null ? [] : [tag]));
  const last = ends.at(-1);
  const pastRecord = last === undefined ? undefined : rising ? recorded.find((value) => value > last) : recorded.findLast((value) => value < last);
  const bounds = new Map<number, { below: number; above: number }>();
  ends.forEach((end, position) => {
    const next = ends[position + 1] ?? pastRecord;
    if (next !== undefined) bounds.set(end, rising ? { below: end, above: next } : { below: next, above: end });
  });
  return bounds;
}

function changeOf(threshold: Threshold, path: string, { below, above }: { below: number; above: number }, hanging: readonly HangingCase[], recorded: readonly number[]) {
  const { rule, comparison, operator, from } = threshold;
  const definition = findFact(comparison.fact);
  const to = thresholdBetween(below, above, operator, definition?.whole ?? false);
  const when = replaceAt(rule.when, threshold.path, { ...comparison, value: to });
  const interval = thresholdInterval(hanging, { below, above }, [recorded[0] ?? below, recorded.at(-1) ?? above]);
  const range = `${formatNumber(interval.low, 6)} and ${formatNumber(interval.high, 6)}`;
  return {
    change: { kind: "threshold" as const, path, fact: comparison.fact, from, to, interval },
    formerRule: rule,
    rule: { ...rule, when },
    words: `In “${rule.title}” move the bound of ${definition?.label ?? comparison.fact} from ${describeValue(from, definition)} to ${describeValue(to, definition)}, so that it holds when ${describeCondition(when)}. The record places the bound between ${range} (90 %).`,
  };
}
