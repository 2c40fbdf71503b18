import type { FactDefinition, FactValue } from "./fact";
import type { Comparison, ComparisonOperator } from "./rule-schema";

/** What remains possible for one fact after some comparisons. */
export type Domain = {
  fact: FactDefinition;
  low: number;
  lowOpen: boolean;
  high: number;
  highOpen: boolean;
  /** Values still possible one by one, null where any of the type will do. */
  members: ReadonlySet<FactValue> | null;
  excluded: ReadonlySet<FactValue>;
  /** Members a list has, and those it has not. */
  required: ReadonlySet<FactValue>;
  forbidden: ReadonlySet<FactValue>;
  impossible: boolean;
};

/** All that the registry allows. */
export function fullDomain(fact: FactDefinition): Domain {
  const [low, high] = fact.range ?? [-Infinity, Infinity];
  const words = fact.type === "string" ? fact.allowed : fact.type === "boolean" ? [true, false] : null;
  const none: ReadonlySet<FactValue> = new Set();
  const members = words === null ? null : new Set<FactValue>(words);
  return { fact, low, lowOpen: false, high, highOpen: false, members, excluded: none, required: none, forbidden: none, impossible: false };
}

/** Operators that hold exactly where the other fails, for facts that are known and of the right type. */
export const complements: Record<ComparisonOperator, ComparisonOperator> = {
  equal: "notEqual",
  notEqual: "equal",
  lessThan: "greaterThanInclusive",
  greaterThanInclusive: "lessThan",
  lessThanInclusive: "greaterThan",
  greaterThan: "lessThanInclusive",
  in: "notIn",
  notIn: "in",
  contains: "doesNotContain",
  doesNotContain: "contains",
};

/** The domain after one more comparison of the same fact. Comparisons must fit the fact's type. */
export function narrow(domain: Domain, { operator, value }: Comparison): Domain {
  switch (operator) {
    case "equal":
      return Array.isArray(value) ? { ...domain, impossible: true } : keepMembers(domain, [value]);
    case "notEqual":
      return Array.isArray(value) ? domain : { ...domain, excluded: joined(domain.excluded, [value]) };
    case "in":
      return keepMembers(domain, Array.isArray(value) ? value : []);
    case "notIn":
      return { ...domain, excluded: joined(domain.excluded, Array.isArray(value) ? value : []) };
    case "contains":
      return { ...domain, required: joined(domain.required, [value]) };
    case "doesNotContain":
      return { ...domain, forbidden: joined(domain.forbidden, [value]) };
    case "lessThan":
      return lowerTop(domain, Number(value), true);
    case "lessThanInclusive":
      return lowerTop(domain, Number(value), false);
    case "greaterThan":
      return raiseBottom(domain, Number(value), true);
    case "greaterThanInclusive":
      return raiseBottom(domain, Number(value), false);
  }
}

function keepMembers(domain: Domain, values: readonly FactValue[]): Domain {
  const kept = values.filter((value) => domain.members === null || domain.members.has(value));
  return { ...domain, members: new Set(kept) };
}

function joined(set: ReadonlySet<FactValue>, values: readonly FactValue[]): ReadonlySet<FactValue> {
  return new Set([...set, ...values]);
}

function lowerTop(domain: Domain, high: number, open: boolean): Domain {
  if (high > domain.high || (high === domain.high && !open)) return domain;
  return { ...domain, high, highOpen: open };
}

function raiseBottom(domain: Domain, low: number, open: boolean): Domain {
  if (low < domain.low || (low === domain.low && !open)) return domain;
  return { ...domain, low, lowOpen: open };
}

/** Whether no value is left. Exact for one fact by itself. */
export function isEmpty(domain: Domain): boolean {
  if (domain.impossible) return true;
  if (domain.fact.type === "list") return isEmptyList(domain);
  if (domain.members !== null) return [...domain.members].every((value) => !isInside(domain, value));
  if (domain.fact.type === "number") return isEmptyInterval(domain);
  return false;
}

function isEmptyList({ required, forbidden, fact: { allowed } }: Domain): boolean {
  return [...required].some((value) => forbidden.has(value) || (allowed !== null && !allowed.some((word) => word === value)));
}

function isInside({ fact, low, lowOpen, high, highOpen, excluded }: Domain, value: FactValue): boolean {
  if (excluded.has(value)) return false;
  if (typeof value !== "number" || fact.type !== "number") return typeof value !== "number" && fact.type !== "number";
  if (fact.whole && !Number.isInteger(value)) return false;
  return (lowOpen ? value > low : value >= low) && (highOpen ? value < high : value <= high);
}

function isEmptyInterval(domain: Domain): boolean {
  const { fact, low, lowOpen, high, highOpen, excluded } = domain;
  if (!fact.whole) return low > high || (low === high && (lowOpen || highOpen || excluded.has(low)));
  const first = lowOpen ? Math.floor(low) + 1 : Math.ceil(low);
  const last = highOpen ? Math.ceil(high) - 1 : Math.floor(high);
  if (last - first + 1 > excluded.size) return false;
  for (let value = first; value <= last; value += 1) if (!excluded.has(value)) return false;
  return true;
}
