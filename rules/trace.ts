import { compileCondition } from "./compile";
import type { Facts, FactValue } from "./fact";
import type { Comparison, Condition } from "./rule-schema";
import type { Truth } from "./truth";

/** A condition's tree with what each part came to on one case, and the fact values that decided it (null: absent). */
export type ConditionTrace =
  | { kind: "comparison"; comparison: Comparison; factValue: FactValue | null; truth: Truth }
  | { kind: "all" | "any" | "not"; members: ConditionTrace[]; truth: Truth };

/** Explain a condition on one case, part by part, in reading order. */
export function traceCondition(condition: Condition, facts: Facts): ConditionTrace {
  const truth = compileCondition(condition)(facts);
  if ("fact" in condition) {
    const factValue = Object.hasOwn(facts, condition.fact) ? (facts[condition.fact] ?? null) : null;
    return { kind: "comparison", comparison: condition, factValue, truth };
  }
  if ("not" in condition) return { kind: "not", members: [traceCondition(condition.not, facts)], truth };
  if ("all" in condition) return { kind: "all", members: condition.all.map((member) => traceCondition(member, facts)), truth };
  return { kind: "any", members: condition.any.map((member) => traceCondition(member, facts)), truth };
}
