import { describe, expect, it } from "vitest";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { editionFile, editionJsonSchema, parseEdition } from "@/rules/edition-json-schema";
import { firstEdition } from "@/rules/sets/first-edition";
import { ruleOf } from "../../support/arbitrary-rules";

const rule = ruleOf("a", { all: [{ fact: "degree", operator: "lessThan", value: 3 }, { not: { fact: "cores", operator: "greaterThan", value: 64 } }] });
const file = (change: object) => ({ ...editionFile([rule], "A note."), ...change });
const parse = (json: unknown) => parseEdition(json, parameterCatalogue);
const paths = (json: unknown) => parse(json).problems.filter(({ severity }) => severity === "error").map(({ path }) => path);

describe("an edition as a file", () => {
  it("reads the first edition back unchanged from its text", () => {
    const written = editionFile(firstEdition, "The first.");
    expect(parse(JSON.stringify(written))).toMatchObject({ ok: true, edition: written });
  });

  it.each<[string, unknown, string]>([
    ["no JSON", "{", ""],
    ["another format", file({ format: "something" }), "format"],
    ["another version", file({ version: 2 }), "version"],
    ["an unknown key", file({ extra: 1 }), ""],
    ["no rules", { format: "saddlemark-edition", version: 1 }, "rules"],
    ["an id used twice", file({ rules: [rule, rule] }), "rules.1.id"],
    ["an unknown operator deep in a condition", file({ rules: [{ ...rule, when: { all: [{ not: { fact: "degree", operator: "above", value: 3 } }] } }] }), "rules.0.when.all.0.not.operator"],
    ["a factor below 1", file({ rules: [{ ...rule, then: [{ kind: "favour", strategy: "bddc", factor: 0.5 }] }] }), "rules.0.then.0.factor"],
    ["an unknown fact", file({ rules: [{ ...rule, when: { any: [{ fact: "weather", operator: "equal", value: 1 }] } }] }), "rules.0.when.any.0.fact"],
    ["a word where a number belongs", file({ rules: [{ ...rule, when: { fact: "degree", operator: "equal", value: "low" } }] }), "rules.0.when.value"],
  ])("refuses %s, saying where", (_name, json, path) => {
    expect(parse(json).ok).toBe(false);
    expect(paths(json)).toContain(path);
    expect(parse(json).problems.every(({ message }) => message.endsWith("."))).toBe(true);
  });

  it("accepts a rule that earns a warning, and passes the warning on", () => {
    const always = { ...rule, when: { fact: "degree", operator: "greaterThanInclusive", value: 1 } };
    expect(parse(file({ rules: [always] }))).toMatchObject({ ok: true, problems: [{ path: "rules.0.when", severity: "warning" }] });
  });

  it("publishes a JSON Schema that names every part and refers to itself for nested conditions", () => {
    const schema = editionJsonSchema();
    expect(schema).toMatchObject({ $schema: "https://json-schema.org/draft/2020-12/schema", type: "object", required: ["format", "version", "rules"], additionalProperties: false });
    expect(schema).toMatchObject({ properties: { format: { const: "saddlemark-edition" }, version: { const: 1 }, rules: { type: "array", maxItems: 500 } } });
    expect(JSON.stringify(schema)).toContain("$ref");
  });
});
