import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import { describeCondition } from "@/rules/describe";
import type { FactDefinition, FactValue } from "@/rules/fact";
import { factDefinitions } from "@/rules/facts";
import type { Comparison, Effect, Rule } from "@/rules/rule-schema";
import { forceOf } from "../first-choices";
import type { ThresholdInterval } from "../proposal-schema";
import type { Steps } from "../run-in-steps";
import type { Family } from "./family";
import { thresholdBetween } from "./nice-value";
import { firstsWith, lossOf, type SearchRecord } from "./search-record";
import { thresholdInterval } from "./threshold-interval";
import { leastChangedCases, walkOf, type Step } from "./walk";

/** Factors that a new rule is tried with. */
const factorsTried = [1.5, 2.5, 5] as const;

/** Facts that a new rule may ask about: what a person answers and what follows by counting, and the model's own comparison. */
const factsTried = factDefinitions.filter(({ group, name }) => group === "answers" || group === "sizes" || name === "directToFastestRatio");

type Preference = Extract<Effect, { kind: "favour" | "disfavour" }>;
type Change = { after: number; gain: number };

/**
 * New rules with one comparison and one favour or disfavour. A family is one side of one number, or one word, with one effect. Families
 * that change the same cases in the same order to the same end (facts that go together, factors that act alike) are kept once.
 */
export function* regionFamilies(record: SearchRecord): Steps<Family[]> {
  const families = new Map<string, Family>();
  const facts = factsTried.map((fact) => orderFact(record, fact));
  const effects = effectsTried(record);
  for (const [done, effect] of effects.entries()) {
    const changes = changesBy(record, effect);
    if (changes.size < leastChangedCases) continue;
    for (const [fact, ordered] of facts.entries()) {
      for (const family of familiesOf(record, ordered, effect, changes)) {
        const same = changesKey(family);
        if (!families.has(same)) families.set(same, family);
      }
      yield (done + fact / facts.length) / effects.length;
    }
  }
  return [...families.values()];
}

function changesKey({ walks }: Family): string {
  return walks.map(({ cases, afters, ends }) => `${cases.join()}|${afters.join()}|${ends.map(({ count }) => count).join()}`).join(";");
}

/** Favours of what was compared, disfavours of what comes first somewhere. */
function effectsTried(record: SearchRecord): Preference[] {
  return strategyIds.flatMap((strategy, place) => {
    const measured = record.rows.some((_, index) => !Number.isNaN(lossOf(record, index, place)));
    const favours = measured ? factorsTried.map((factor): Preference => ({ kind: "favour", strategy, factor })) : [];
    return record.firsts.includes(place) ? [...favours, ...factorsTried.map((factor): Preference => ({ kind: "disfavour", strategy, factor }))] : favours;
  });
}

/** A fact's values over the contested cases that have it, numbers in rising order, and over the whole record. */
type OrderedFact = { fact: FactDefinition; values: readonly { index: number; value: FactValue }[]; recorded: readonly number[] };

function orderFact(record: SearchRecord, fact: FactDefinition): OrderedFact {
  const all = record.prepared.valuesOf(fact.name);
  const values = record.rows.flatMap((row, index) => {
    const value = all[row];
    return value === undefined ? [] : [{ index, value }];
  });
  if (fact.type === "number") values.sort((a, b) => Number(a.value) - Number(b.value));
  return { fact, values, recorded: all.filter((value) => typeof value === "number").sort((a, b) => a - b) };
}

/** What an effect would change if it acted everywhere, by contested case. */
function changesBy(record: SearchRecord, effect: Preference): ReadonlyMap<number, Change> {
  const everywhere = new Uint8Array(record.prepared.cases.length).fill(2);
  const afters = firstsWith(record, null, forceOf({ then: [effect] }), everywhere);
  const changes = new Map<number, Change>();
  record.rows.forEach((_, index) => {
    const [before, after] = [record.firsts[index] ?? -1, afters[index] ?? -1];
    if (before !== after) changes.set(index, { after, gain: lossOf(record, index, before) - lossOf(record, index, after) });
  });
  return changes;
}

function familiesOf(record: SearchRecord, ordered: OrderedFact, effect: Preference, changes: ReadonlyMap<number, Change>): Family[] {
  const { fact } = ordered;
  const placed = ordered.values.flatMap(({ index, value }): Placed[] => {
    const change = changes.get(index);
    return change === undefined ? [] : [{ index, value, ...change }];
  });
  if (placed.length < leastChangedCases) return [];
  if (fact.type === "number") {
    const numbers = placed.flatMap(({ value, ...change }) => (typeof value === "number" ? [{ ...change, value }] : []));
    return [true, false].flatMap((upper) => numberFamily(record, ordered, effect, numbers, upper) ?? []);
  }
  const words: FactValue[] = fact.type === "boolean" ? [true, false] : [...(fact.allowed ?? [])];
  return words.flatMap((word) => wordFamily(record, fact, effect, placed, word) ?? []);
}

type Placed = Change & { index: number; value: FactValue };
type PlacedNumber = Change & { index: number; value: number };

/** The upper (or lower) side of a number, grown from the record's end; `rising` are the changed cases by value. */
function numberFamily(record: SearchRecord, { fact, recorded }: OrderedFact, effect: Preference, rising: readonly PlacedNumber[], upper: boolean): Family | null {
  const walked = upper ? rising.toReversed() : rising;
  const last = walked.at(-1)?.value ?? 0;
  const pastLast = upper ? recorded.findLast((value) => value < last) : recorded.find((value) => value > last);
  const bounds = new Map<number, { below: number; above: number }>();
  const steps = walked.map(({ index, after, value }, position): Step => {
    const next = position + 1 < walked.length ? walked[position + 1]?.value : pastLast;
    if (next === undefined || next === value) return { index, after, tag: null };
    bounds.set(value, upper ? { below: next, above: value } : { below: value, above: next });
    return { index, after, tag: value };
  });
  const walk = walkOf(record, steps);
  if (walk === null) return null;
  return {
    key: `new-rule:${fact.name}:${upper ? "upper" : "lower"}:${effectKey(effect)}`,
    kind: "new-rule",
    walks: [walk],
    changeOf: ({ tag }) => {
      const between = bounds.get(tag) ?? { below: tag, above: tag };
      const operator = upper ? "greaterThanInclusive" : "lessThan";
      const value = thresholdBetween(between.below, between.above, operator, fact.whole);
      const gains = rising.map(({ value: at, gain }) => ({ value: at, gainAbove: Number.isNaN(gain) ? null : upper ? gain : -gain }));
      const interval = thresholdInterval(gains, between, [recorded[0] ?? value, recorded.at(-1) ?? value]);
      return changeOf(record, { fact: fact.name, operator, value }, effect, value, interval);
    },
  };
}

function wordFamily(record: SearchRecord, fact: FactDefinition, effect: Preference, placed: readonly Placed[], word: FactValue): Family | null {
  if (typeof word === "object") return null;
  const inside = placed.filter(({ value }) => (Array.isArray(value) ? value.some((member) => member === word) : value === word));
  const walk = walkOf(record, inside.map(({ index, after }, position) => ({ index, after, tag: position === inside.length - 1 ? 0 : null })));
  if (walk === null) return null;
  return {
    key: `new-rule:${fact.name}:${String(word)}:${effectKey(effect)}`,
    kind: "new-rule",
    walks: [walk],
    changeOf: () => changeOf(record, { fact: fact.name, operator: fact.type === "list" ? "contains" : "equal", value: word }, effect, word, null),
  };
}

function effectKey({ kind, strategy, factor }: Preference): string {
  return `${kind}:${strategy}:${factor}`;
}

function changeOf(record: SearchRecord, when: Comparison, effect: Preference, value: number | string | boolean, interval: ThresholdInterval | null) {
  const { kind, strategy, factor } = effect;
  const words = describeCondition(when);
  const rule: Rule = {
    id: freeId(record, strategy, when.fact, kind),
    title: `${kind === "favour" ? "Prefer" : "Avoid"} ${strategy} where ${words}`.slice(0, 160),
    enabled: true,
    when,
    then: [effect],
    rationale: "The team's runs",
    source: { kind: "common-practice" },
  };
  return {
    change: { kind: "new-rule" as const, fact: when.fact, value, interval, strategy, factor },
    formerRule: null,
    rule,
    words: `New rule: where ${words}, ${kind} ${strategy} by ${factor}x.`,
  };
}

/** An id no rule has yet. */
function freeId({ live }: SearchRecord, strategy: StrategyId, fact: string, kind: Preference["kind"]): string {
  const words = fact.replaceAll(/[A-Z]+/g, (letters) => `-${letters.toLowerCase()}`);
  const base = `record-${kind}s-${strategy}-by-${words}`.slice(0, 74).replace(/-+$/, "");
  const taken = new Set(live.ruleSet.map(({ id }) => id));
  let id = base;
  for (let count = 2; taken.has(id); count += 1) id = `${base}-${count}`;
  return id;
}
