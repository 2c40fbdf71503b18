import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import { describeCondition } from "@/rules/describe";
import type { FactDefinition, FactValue } from "@/rules/fact";
import { factDefinitions } from "@/rules/facts";
import type { Comparison, Effect, Rule } from "@/rules/rule-schema";
import { forceOf } from "../first-choices";
import type { ThresholdInterval } from "../proposal-schema";
import type { Family } from "./family";
import { thresholdBetween } from "./nice-value";
import { firstsWith, lossOf, type SearchRecord } from "./search-record";
import { thresholdInterval } from "./threshold-interval";
import { walkOf, type Step } from "./walk";

/** Factors that a new rule is tried with. */
const factorsTried = [1.5, 2.5, 5] as const;

/** Facts that a new rule may ask about: what a person answers and what follows by counting, and the model's own comparison. */
const factsTried = factDefinitions.filter(({ group, name }) => group === "answers" || group === "sizes" || name === "directToFastestRatio");

type Preference = Extract<Effect, { kind: "favour" | "disfavour" }>;
type Change = { index: number; after: number; gain: number };

/**
 * New rules with one comparison and one favour or disfavour. A family is one side of one number, or one word, with one effect. Families
 * that change the same cases in the same order to the same end (facts that go together, factors that act alike) are kept once.
 */
export function regionFamilies(record: SearchRecord): Family[] {
  const families = new Map<string, Family>();
  for (const effect of effectsTried(record)) {
    const changes = changesBy(record, effect);
    if (changes.length === 0) continue;
    for (const family of factsTried.flatMap((fact) => familiesOf(record, fact, effect, changes))) {
      const steps = family.walks[0];
      const same = `${steps?.cases.join()}|${steps?.afters.join()}|${steps?.ends.map(({ count }) => count).join()}`;
      if (!families.has(same)) families.set(same, family);
    }
  }
  return [...families.values()];
}

/** Favours of what was compared, disfavours of what comes first somewhere. */
function effectsTried(record: SearchRecord): Preference[] {
  return strategyIds.flatMap((strategy, place) => {
    const measured = record.rows.some((_, index) => !Number.isNaN(lossOf(record, index, place)));
    const favours = measured ? factorsTried.map((factor): Preference => ({ kind: "favour", strategy, factor })) : [];
    return record.firsts.includes(place) ? [...favours, ...factorsTried.map((factor): Preference => ({ kind: "disfavour", strategy, factor }))] : favours;
  });
}

function changesBy(record: SearchRecord, effect: Preference): Change[] {
  const everywhere = new Uint8Array(record.prepared.cases.length).fill(2);
  const afters = firstsWith(record, null, forceOf({ then: [effect] }), everywhere);
  return record.rows.flatMap((_, index) => {
    const [before, after] = [record.firsts[index] ?? -1, afters[index] ?? -1];
    return before === after ? [] : [{ index, after, gain: lossOf(record, index, before) - lossOf(record, index, after) }];
  });
}

function familiesOf(record: SearchRecord, fact: FactDefinition, effect: Preference, changes: readonly Change[]): Family[] {
  const values = record.prepared.valuesOf(fact.name);
  const placed = changes.flatMap((change) => {
    const value = values[record.rows[change.index] ?? -1];
    return value === undefined ? [] : [{ ...change, value }];
  });
  if (fact.type === "number") return [true, false].flatMap((upper) => numberFamily(record, fact, effect, placed, upper) ?? []);
  const words: FactValue[] = fact.type === "boolean" ? [true, false] : [...(fact.allowed ?? [])];
  return words.flatMap((word) => wordFamily(record, fact, effect, placed, word) ?? []);
}

type Placed = Change & { value: FactValue };

/** The upper (or lower) side of a number, grown from the record's end. */
function numberFamily(record: SearchRecord, fact: FactDefinition, effect: Preference, placed: readonly Placed[], upper: boolean): Family | null {
  const sign = upper ? -1 : 1;
  const numbers = placed.flatMap(({ value, ...change }) => (typeof value === "number" ? [{ ...change, value }] : []));
  const walked = numbers.sort((a, b) => sign * (a.value - b.value));
  const recorded = record.prepared.valuesOf(fact.name).filter((value) => typeof value === "number").toSorted((a, b) => a - b);
  const nextOf = (last: number) => {
    const beyond = (value: number) => (upper ? value < last : value > last);
    return walked.find(({ value }) => beyond(value))?.value ?? (upper ? recorded.findLast(beyond) : recorded.find(beyond));
  };
  const steps = walked.map(({ index, after, value }, position): Step => {
    const ends = walked[position + 1]?.value !== value && nextOf(value) !== undefined;
    return { index, after, tag: ends ? value : null };
  });
  const walk = walkOf(record, steps);
  if (walk === null) return null;
  return {
    key: `new-rule:${fact.name}:${upper ? "upper" : "lower"}:${effectKey(effect)}`,
    kind: "new-rule",
    walks: [walk],
    changeOf: ({ tag }) => {
      const next = nextOf(tag) ?? tag;
      const bounds = upper ? { below: next, above: tag } : { below: tag, above: next };
      const operator = upper ? "greaterThanInclusive" : "lessThan";
      const value = thresholdBetween(bounds.below, bounds.above, operator, fact.whole);
      const ascending = numbers.toSorted((a, b) => a.value - b.value).map(({ value: at, gain }) => ({ value: at, gainAbove: Number.isNaN(gain) ? null : upper ? gain : -gain }));
      const interval = thresholdInterval(ascending, bounds, [recorded[0] ?? value, recorded.at(-1) ?? value]);
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
