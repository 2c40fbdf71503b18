import type { RuleSource } from "@/rules/rule-schema";

/** Where a rule comes from, in a few words. */
export function sourceText(source: RuleSource): string {
  if (source.kind === "published") return source.citation;
  return source.kind === "team-evidence" ? `team evidence: ${source.numbers}` : "common practice";
}
