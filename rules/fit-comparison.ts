import type { FactDefinition, FactType, FactValue } from "./fact";
import type { Comparison, ComparisonOperator } from "./rule-schema";

/** Operators that make sense for a fact of each type. */
export const operatorsOf: Record<FactType, readonly ComparisonOperator[]> = {
  number: ["equal", "notEqual", "lessThan", "lessThanInclusive", "greaterThan", "greaterThanInclusive", "in", "notIn"],
  string: ["equal", "notEqual", "in", "notIn"],
  boolean: ["equal", "notEqual"],
  list: ["contains", "doesNotContain"],
};

/** What is wrong with a comparison of this fact, and where in it; null when it fits. */
export function misfitOf(definition: FactDefinition, { operator, value }: Comparison): { key: "operator" | "value"; message: string } | null {
  const { label, type } = definition;
  if (!operatorsOf[type].includes(operator)) {
    return { key: "operator", message: `${operator} does not go with ${label}, which is a ${type}; use ${operatorsOf[type].join(", ")}.` };
  }
  const wantsList = operator === "in" || operator === "notIn";
  if (wantsList !== Array.isArray(value)) {
    return { key: "value", message: wantsList ? `${operator} compares with a list of values.` : `${operator} compares with one value, not a list.` };
  }
  const values: readonly FactValue[] = Array.isArray(value) ? value : [value];
  if (values.length === 0) return { key: "value", message: "The list of values is empty." };
  const wrong = values.map((single) => misfitOfValue(definition, single)).find((message) => message !== null);
  return wrong ? { key: "value", message: wrong } : null;
}

function misfitOfValue({ label, unit, type, allowed }: FactDefinition, value: FactValue): string | null {
  const shown = JSON.stringify(value);
  if (type === "number") {
    return typeof value === "number" ? null : `${label} is compared with a number${unit === "" ? "" : ` in ${unit}`}, not with ${shown}.`;
  }
  if (type === "boolean") return typeof value === "boolean" ? null : `${label} is true or false, not ${shown}.`;
  if (typeof value !== "string") return `${label} is compared with a word, not with ${shown}.`;
  if (allowed !== null && !allowed.includes(value)) return `${label} can't be ${shown}; it is one of ${allowed.join(", ")}.`;
  return null;
}
