import { formatNumber } from "@/lib/shared/format";
import type { FactDefinition, FactValue } from "./fact";
import { findFact } from "./facts";
import type { Comparison, ComparisonOperator, Condition, Effect, RuleSource } from "./rule-schema";

/** A condition in the trade's words: "degree is at most 2 and cores are more than 256". */
export function describeCondition(condition: Condition): string {
  return phrase(condition, false);
}

/** Words of a comparison after is or are. */
const operatorWords: Record<ComparisonOperator, string> = {
  equal: "",
  notEqual: "not",
  lessThan: "less than",
  lessThanInclusive: "at most",
  greaterThan: "more than",
  greaterThanInclusive: "at least",
  in: "one of",
  notIn: "none of",
  contains: "includes",
  doesNotContain: "does not include",
};

function phrase(condition: Condition, nested: boolean): string {
  if ("fact" in condition) return describeComparison(condition);
  if ("not" in condition) return describeNot(condition.not);
  const members = "all" in condition ? condition.all : condition.any;
  const joined = members.map((member) => phrase(member, members.length > 1)).join("all" in condition ? " and " : " or ");
  return nested && members.length > 1 ? `(${joined})` : joined;
}

function describeNot(inner: Condition): string {
  if ("any" in inner) return `none of (${inner.any.map((member) => phrase(member, true)).join("; ")})`;
  return `not (${phrase(inner, false)})`;
}

function describeComparison({ fact, operator, value }: Comparison): string {
  const definition = findFact(fact);
  const label = definition?.label ?? fact;
  if (operator === "contains" || operator === "doesNotContain") return `${label} ${operatorWords[operator]} ${describeValue(value, definition)}`;
  if (definition?.type === "boolean") return describeYesNo(definition, (operator === "equal") === (value === true));
  const verb = definition?.plural ? "are" : "is";
  return [label, verb, operatorWords[operator], describeValue(value, definition)].filter((word) => word !== "").join(" ");
}

const yesNoWords: Record<string, readonly [yes: string, no: string]> = {
  timeLimitGiven: ["a time limit is given", "no time limit is given"],
  countsExact: ["counts are exact", "counts are means of a random mesh"],
};

function describeYesNo({ name, label }: FactDefinition, yes: boolean): string {
  const words = yesNoWords[name];
  if (words) return yes ? words[0] : words[1];
  return `${label} is ${yes ? "true" : "false"}`;
}

/** A value with the fact's unit; closed sets with their hyphens, as the questionnaire names them. */
export function describeValue(value: FactValue, definition: FactDefinition | undefined): string {
  if (typeof value === "object") {
    return value.map((member) => describeValue(member, definition)).join(", ");
  }
  if (typeof value !== "number") return String(value);
  const figures = formatNumber(value, 6);
  return definition === undefined || definition.unit === "" ? figures : `${figures} ${definition.unit}`;
}

/** An effect in words; `nameOf` gives a strategy's name, its id by default. */
export function describeEffect(effect: Effect, nameOf: (strategy: Effect["strategy"] & string) => string = (id) => id): string {
  switch (effect.kind) {
    case "favour":
      return effect.factor === 1 ? `speaks for ${nameOf(effect.strategy)}; the model already counts it` : `favour ${nameOf(effect.strategy)}: expect it ${factorWords(effect.factor)} faster than the model says`;
    case "disfavour":
      return effect.factor === 1
        ? `speaks against ${nameOf(effect.strategy)}; the model already counts it`
        : `disfavour ${nameOf(effect.strategy)}: expect ${factorWords(effect.factor)} the time the model says`;
    case "exclude":
      return `exclude ${nameOf(effect.strategy)}: ${effect.reason}`;
    case "set":
      return `set ${effect.parameter} of ${nameOf(effect.strategy)} to ${typeof effect.value === "number" ? formatNumber(effect.value, 6) : effect.value}`;
    case "caution":
      return effect.strategy === null ? `caution: ${effect.text}` : `caution for ${nameOf(effect.strategy)}: ${effect.text}`;
    case "fallback":
      return `fall back from ${nameOf(effect.strategy)} to ${nameOf(effect.to)} when ${effect.when}`;
  }
}

const factorWords = (factor: number): string => `${formatNumber(factor, 3)}x`;

/** A source in words. */
export function describeSource(source: RuleSource): string {
  switch (source.kind) {
    case "common-practice":
      return "common practice, no source";
    case "published":
      return source.citation;
    case "team-evidence":
      return `team evidence: ${source.numbers}`;
  }
}
