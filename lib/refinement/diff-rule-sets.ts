import { z } from "zod";
import { describeCondition, describeEffect, describeSource } from "@/rules/describe";
import type { Effect, Rule, RuleSet } from "@/rules/rule-schema";
import { sameContent } from "./same-content";

export const ruleAspects = ["title", "enabled", "condition", "effects", "rationale", "source", "order"] as const;
export type RuleAspect = (typeof ruleAspects)[number];

export const ruleDifferenceSchema = z.object({
  ruleId: z.string(),
  title: z.string(),
  kind: z.enum(["added", "removed", "changed"]),
  /** The differences one by one, in words; `before` and `after` are null where there is nothing on that side. */
  changes: z.array(z.object({ aspect: z.enum(ruleAspects), before: z.string().nullable(), after: z.string().nullable(), text: z.string() })),
});
export type RuleDifference = z.infer<typeof ruleDifferenceSchema>;

type Change = RuleDifference["changes"][number];

/** Names of strategies in the words, ids by default. */
export type NameOf = NonNullable<Parameters<typeof describeEffect>[1]>;

/**
 * What differs between two rule sets, rule by rule and known by id: in the new order, then the removed ones in the old. Empty when nothing
 * does. Order is told of the fewest rules whose moving explains it. `nameOf` gives a strategy's name.
 */
export function diffRuleSets(before: RuleSet, after: RuleSet, nameOf: NameOf = (id) => id): RuleDifference[] {
  const old = new Map(before.map((rule) => [rule.id, rule]));
  const now = new Map(after.map((rule) => [rule.id, rule]));
  const moved = movedIds(before.filter(({ id }) => now.has(id)), after.filter(({ id }) => old.has(id)));
  const present = after.flatMap((rule, place): RuleDifference[] => {
    const former = old.get(rule.id);
    if (former === undefined) return [{ ...nameRule(rule), kind: "added", changes: wholeRule(rule, nameOf, (text) => ({ before: null, after: text })) }];
    const order = moved.has(rule.id) ? [orderChange(before.indexOf(former), place)] : [];
    const changes = [...changesOf(former, rule, nameOf), ...order];
    return changes.length === 0 ? [] : [{ ...nameRule(rule), kind: "changed", changes }];
  });
  const removed = before.filter(({ id }) => !now.has(id));
  return [...present, ...removed.map((rule): RuleDifference => ({ ...nameRule(rule), kind: "removed", changes: wholeRule(rule, nameOf, (text) => ({ before: text, after: null })) }))];
}

function nameRule({ id, title }: Rule): Pick<RuleDifference, "ruleId" | "title"> {
  return { ruleId: id, title };
}

function wholeRule(rule: Rule, nameOf: NameOf, side: (text: string) => Pick<Change, "before" | "after">): Change[] {
  const part = (aspect: RuleAspect, text: string, words: string): Change => ({ aspect, ...side(text), text: words });
  const when = describeCondition(rule.when);
  const effects = rule.then.map((effect) => describeEffect(effect, nameOf));
  return [
    ...(rule.enabled ? [] : [part("enabled", "off", "Switched off.")]),
    part("condition", when, `When ${when}.`),
    ...effects.map((effect) => part("effects", effect, `Then ${bare(effect)}.`)),
    part("rationale", rule.rationale, `Because: ${bare(rule.rationale)}.`),
    part("source", describeSource(rule.source), `Source: ${bare(describeSource(rule.source))}.`),
  ];
}

function changesOf(old: Rule, now: Rule, nameOf: NameOf): Change[] {
  const words = (aspect: RuleAspect, label: string, was: string, is: string): Change[] => [{ aspect, before: was, after: is, text: `${label}: ${bare(is)}, instead of: ${bare(was)}.` }];
  const onOff = (enabled: boolean) => (enabled ? "on" : "off");
  return [
    ...(old.title === now.title ? [] : words("title", "Title", old.title, now.title)),
    ...(old.enabled === now.enabled ? [] : [{ aspect: "enabled" as const, before: onOff(old.enabled), after: onOff(now.enabled), text: `Switched ${onOff(now.enabled)}.` }]),
    ...(sameContent(old.when, now.when) ? [] : words("condition", "When", describeCondition(old.when), describeCondition(now.when))),
    ...effectChanges(old.then, now.then, nameOf),
    ...(old.rationale === now.rationale ? [] : words("rationale", "Rationale", old.rationale, now.rationale)),
    ...(sameContent(old.source, now.source) ? [] : words("source", "Source", describeSource(old.source), describeSource(now.source))),
  ];
}

/** Effects on the same thing are told as one change, others as gone and new; a mere change of their order is told as such. */
function effectChanges(old: readonly Effect[], now: readonly Effect[], nameOf: NameOf): Change[] {
  if (sameContent(old, now)) return [];
  const gone = unmatched(old, now);
  const fresh = unmatched(now, old);
  const paired = new Set<Effect>();
  const changes = fresh.map((effect): Change => {
    const after = describeEffect(effect, nameOf);
    const former = gone.find((other) => !paired.has(other) && subjectOf(other) === subjectOf(effect));
    if (former === undefined) return { aspect: "effects", before: null, after, text: `New effect: ${bare(after)}.` };
    paired.add(former);
    const before = describeEffect(former, nameOf);
    return { aspect: "effects", before, after, text: `Then ${bare(after)}, instead of: ${bare(before)}.` };
  });
  const removed = gone.filter((effect) => !paired.has(effect)).map((effect): Change => {
    const before = describeEffect(effect, nameOf);
    return { aspect: "effects", before, after: null, text: `No longer: ${bare(before)}.` };
  });
  if (changes.length + removed.length > 0) return [...changes, ...removed];
  const listed = (effects: readonly Effect[]) => effects.map((effect) => describeEffect(effect, nameOf)).join("; ");
  return [{ aspect: "effects", before: listed(old), after: listed(now), text: "The same effects in another order." }];
}

/** Effects of `first` without an equal one in `second`, each counted once. */
function unmatched(first: readonly Effect[], second: readonly Effect[]): Effect[] {
  const left = [...second];
  return first.filter((effect) => {
    const at = left.findIndex((other) => sameContent(other, effect));
    if (at >= 0) left.splice(at, 1);
    return at < 0;
  });
}

/** What an effect is about: a change from favour to disfavour of one strategy is one change. */
function subjectOf(effect: Effect): string {
  const subject: Record<Effect["kind"], string> = { favour: "preference", disfavour: "preference", exclude: "exclude", set: "set", caution: "caution", fallback: "fallback" };
  return [subject[effect.kind], effect.strategy ?? "", effect.kind === "set" ? effect.parameter : ""].join(" ");
}

/** Texts that people wrote may end in a full stop; the sentence around them brings its own. */
function bare(text: string): string {
  return text.replace(/\.$/, "");
}

function orderChange(from: number, to: number): Change {
  return { aspect: "order", before: String(from + 1), after: String(to + 1), text: `Read at place ${to + 1} instead of ${from + 1}.` };
}

/** Ids outside a longest run that kept its order. O(n^2). */
function movedIds(before: readonly Rule[], after: readonly Rule[]): ReadonlySet<string> {
  const places = new Map(before.map(({ id }, index) => [id, index]));
  const chains: string[][] = [];
  for (const { id } of after) {
    const place = places.get(id) ?? 0;
    const earlier = chains.filter((chain) => (places.get(chain.at(-1) ?? "") ?? 0) < place);
    const longest = earlier.reduce<string[]>((best, chain) => (chain.length > best.length ? chain : best), []);
    chains.push([...longest, id]);
  }
  const kept = new Set(chains.reduce<string[]>((best, chain) => (chain.length > best.length ? chain : best), []));
  return new Set(after.map(({ id }) => id).filter((id) => !kept.has(id)));
}
