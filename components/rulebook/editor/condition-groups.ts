import { findFact } from "@/rules/facts";
import { operatorsOf } from "@/rules/fit-comparison";
import type { Comparison, ComparisonOperator, Condition } from "@/rules/rule-schema";

/** Ways of joining conditions, as the editor names them. `not` holds one condition. */
export const groupKinds = ["all", "any", "none", "not-all", "not"] as const;
export type GroupKind = (typeof groupKinds)[number];

export const groupLabels: Record<GroupKind, string> = {
  all: "all of these hold",
  any: "any of these holds",
  none: "none of these holds",
  "not-all": "not all of these hold",
  not: "this does not hold",
};

export type Group = { kind: GroupKind; members: Condition[] };

/** A condition that is no comparison, seen as one group: `not` around `any` or `all` is a kind of its own. */
export function groupOf(condition: Exclude<Condition, Comparison>): Group {
  if ("all" in condition) return { kind: "all", members: condition.all };
  if ("any" in condition) return { kind: "any", members: condition.any };
  if ("any" in condition.not) return { kind: "none", members: condition.not.any };
  if ("all" in condition.not) return { kind: "not-all", members: condition.not.all };
  return { kind: "not", members: [condition.not] };
}

/** The condition of a group; `groupOf` gives the group back. `not` around several becomes `none`. */
export function conditionOf({ kind, members }: Group): Condition {
  const [only] = members;
  switch (kind) {
    case "all":
      return { all: members };
    case "any":
      return { any: members };
    case "none":
      return { not: { any: members } };
    case "not-all":
      return { not: { all: members } };
    case "not":
      return members.length === 1 && only !== undefined && "fact" in only ? { not: only } : { not: { any: members } };
  }
}

/** Where a member stands in the condition, as problems name it: "all.0", "not.any.1", "not". */
export function memberPath(kind: GroupKind, index: number): string {
  const stems: Record<GroupKind, string> = { all: `all.${index}`, any: `any.${index}`, none: `not.any.${index}`, "not-all": `not.all.${index}`, not: "not" };
  return stems[kind];
}

export const blankComparison: Comparison = { fact: "degree", operator: "greaterThanInclusive", value: 1 };

/** The comparison with another fact: operator and value are kept where they still fit. */
export function withFact(comparison: Comparison, fact: string): Comparison {
  const [before, after] = [findFact(comparison.fact), findFact(fact)];
  if (after === undefined) return { ...comparison, fact };
  const sameKind = before?.type === after.type && after.type === "number";
  if (sameKind) return { ...comparison, fact };
  return withOperator({ fact, operator: "equal", value: 0 }, operatorsOf[after.type][0] ?? "equal");
}

/** The comparison with another operator: its value becomes a list, or one of the fact's values, where it must. */
export function withOperator(comparison: Comparison, operator: ComparisonOperator): Comparison {
  const list = operator === "in" || operator === "notIn";
  const { value } = comparison;
  if (list === Array.isArray(value) && fitsType(comparison)) return { ...comparison, operator };
  const single = Array.isArray(value) ? value[0] : value;
  const kept = single !== undefined && fitsType({ ...comparison, value: single }) ? single : firstValue(comparison.fact);
  if (!list) return { ...comparison, operator, value: kept };
  return { ...comparison, operator, value: typeof kept === "boolean" ? [] : [kept] };
}

function fitsType({ fact, value }: Pick<Comparison, "fact" | "value">): boolean {
  const definition = findFact(fact);
  if (definition === undefined) return true;
  const wanted = definition.type === "list" ? "string" : definition.type;
  const values = Array.isArray(value) ? value : [value];
  return values.every((item) => typeof item === wanted && (definition.allowed === null || (typeof item === "string" && definition.allowed.includes(item))));
}

function firstValue(fact: string): number | string | boolean {
  const definition = findFact(fact);
  if (definition?.type === "boolean") return true;
  if (definition?.type === "number") return definition.range?.[0] ?? 0;
  return definition?.allowed?.[0] ?? "";
}
