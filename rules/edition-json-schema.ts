import { z } from "zod";
import { ruleSetSchema, type RuleSet } from "./rule-schema";
import { validateRuleSet, type ParameterCatalogue, type RuleProblem } from "./validate-rule-set";

export const editionFormat = "saddlemark-edition";
export const editionFormatVersion = 1;

/** An edition as a file. */
export const editionFileSchema = z.strictObject({
  format: z.literal(editionFormat),
  version: z.literal(editionFormatVersion),
  note: z.string().max(4000).default(""),
  rules: ruleSetSchema,
});
export type EditionFile = z.infer<typeof editionFileSchema>;

/** The file's JSON Schema (draft 2020-12), of what may be written in; beyond it, ids are unique and conditions fit their facts. */
export function editionJsonSchema(): Record<string, unknown> {
  return { title: "Saddlemark edition", description: "A rulebook edition as exported and imported.", ...z.toJSONSchema(editionFileSchema, { io: "input" }) };
}

/** The file of a rule set; `parseEdition` reads it back unchanged. */
export function editionFile(rules: RuleSet, note: string): EditionFile {
  return { format: editionFormat, version: editionFormatVersion, note, rules };
}

export type ParsedEdition = { ok: true; edition: EditionFile; problems: RuleProblem[] } | { ok: false; problems: RuleProblem[] };

/**
 * Read an edition from text or from parsed JSON. Refused with located errors (`path` such as "rules.3.when.all.0.value", rules counted
 * from 0, "" for the whole) when it is no JSON, not of the schema, or has errors by `validateRuleSet`; warnings and notes are given along.
 */
export function parseEdition(json: unknown, parameters: ParameterCatalogue): ParsedEdition {
  const read = typeof json === "string" ? readJson(json) : { ok: true as const, value: json };
  if (!read.ok) return refused([{ path: "", message: `This is not JSON: ${read.message}.`, severity: "error" }]);
  const parsed = editionFileSchema.safeParse(read.value);
  if (!parsed.success) return refused(parsed.error.issues.flatMap((issue) => problemsOf(issue)));
  const problems = validateRuleSet(parsed.data.rules, parameters).map((problem) => ({ ...problem, path: `rules.${problem.path}` }));
  return problems.some(({ severity }) => severity === "error") ? refused(problems) : { ok: true, edition: parsed.data, problems };
}

function refused(problems: RuleProblem[]): ParsedEdition {
  return { ok: false, problems };
}

function readJson(text: string): { ok: true; value: unknown } | { ok: false; message: string } {
  try {
    const value: unknown = JSON.parse(text);
    return { ok: true, value };
  } catch (error) {
    return { ok: false, message: error instanceof Error ? error.message : "unreadable" };
  }
}

/** A union's issue says nothing by itself: the branch that got furthest into the value is told instead. */
function problemsOf(issue: z.core.$ZodIssue, path: readonly PropertyKey[] = []): RuleProblem[] {
  const full = [...path, ...issue.path];
  if (issue.code === "invalid_union" && issue.errors.length > 0) {
    const depths = issue.errors.map((branch) => Math.max(0, ...branch.map((inner) => depthOf(inner))));
    const branch = issue.errors[depths.indexOf(Math.max(...depths))] ?? [];
    if (Math.max(...depths) > 0) return branch.flatMap((inner) => problemsOf(inner, full));
  }
  return [{ path: full.map(String).join("."), message: messageOf(issue), severity: "error" }];
}

function messageOf(issue: z.core.$ZodIssue): string {
  if (issue.code === "invalid_union") return "This is none of the forms allowed here.";
  return issue.message.endsWith(".") ? issue.message : `${issue.message}.`;
}

function depthOf(issue: z.core.$ZodIssue): number {
  const inner = issue.code === "invalid_union" ? Math.max(0, ...issue.errors.flatMap((branch) => branch.map(depthOf))) : 0;
  return issue.path.length + inner;
}
