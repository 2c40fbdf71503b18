import type { Comparison, Condition } from "@/rules/rule-schema";

/** Every comparison in a condition with its place in it, such as "all.0.not"; "" is the condition itself. */
export function comparisonsOf(condition: Condition, path: readonly string[] = []): { path: readonly string[]; comparison: Comparison }[] {
  if ("fact" in condition) return [{ path, comparison: condition }];
  if ("not" in condition) return comparisonsOf(condition.not, [...path, "not"]);
  const key = "all" in condition ? "all" : "any";
  const members = "all" in condition ? condition.all : condition.any;
  return members.flatMap((member, index) => comparisonsOf(member, [...path, key, String(index)]));
}

/** The condition with the part at `path` replaced. Throws RangeError where there is no such place. */
export function replaceAt(condition: Condition, path: readonly string[], part: Condition): Condition {
  const [key, index] = path;
  if (key === undefined) return part;
  if (key === "not" && "not" in condition) return { not: replaceAt(condition.not, path.slice(1), part) };
  const replaceMember = (members: readonly Condition[]) => {
    const at = Number(index);
    const member = members[at];
    if (member === undefined) throw new RangeError(`A condition has no part ${path.join(".")}.`);
    return members.with(at, replaceAt(member, path.slice(2), part));
  };
  if (key === "all" && "all" in condition) return { all: replaceMember(condition.all) };
  if (key === "any" && "any" in condition) return { any: replaceMember(condition.any) };
  throw new RangeError(`A condition has no part ${path.join(".")}.`);
}
