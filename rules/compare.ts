import type { FactValue } from "./fact";
import type { Comparison } from "./rule-schema";

/** Whether a known fact passes a comparison. */
export type Test = (fact: FactValue) => boolean;

/**
 * The comparison as json-rules-engine 7.3.1 judges it: equality is identity, orderings want a fact that reads as a number, and
 * `contains` wants a list. Throws RangeError for `in` and `notIn` without a list, where json-rules-engine fails at run time.
 */
export function compileTest({ operator, value }: Comparison): Test {
  switch (operator) {
    case "equal":
      return (fact) => fact === value;
    case "notEqual":
      return (fact) => fact !== value;
    case "lessThan":
      return (fact) => readsAsNumber(fact) && fact < value;
    case "lessThanInclusive":
      return (fact) => readsAsNumber(fact) && fact <= value;
    case "greaterThan":
      return (fact) => readsAsNumber(fact) && fact > value;
    case "greaterThanInclusive":
      return (fact) => readsAsNumber(fact) && fact >= value;
    case "in":
      return memberTest(value, true);
    case "notIn":
      return memberTest(value, false);
    case "contains":
      return (fact) => isList(fact) && fact.some((member) => member === value);
    case "doesNotContain":
      return (fact) => isList(fact) && !fact.some((member) => member === value);
  }
}

function memberTest(value: Comparison["value"], wanted: boolean): Test {
  if (!Array.isArray(value)) throw new RangeError("The operators in and notIn compare with a list.");
  const members = new Set<FactValue>(value);
  return (fact) => members.has(fact) === wanted;
}

function readsAsNumber(fact: FactValue): boolean {
  return typeof fact === "number" ? !Number.isNaN(fact) : !Number.isNaN(Number.parseFloat(String(fact)));
}

function isList(fact: FactValue): fact is readonly (number | string)[] {
  return Array.isArray(fact);
}
