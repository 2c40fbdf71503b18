import { describe, expect, it } from "vitest";
import { boundaries, capabilities, contrastPatterns, discretisations, meshFamilies, priorities } from "@/lib/questionnaire/answer-sets";
import { factDefinitions, findFact, parseFacts } from "@/rules/facts";

describe("the registry of facts", () => {
  it("names every fact once, in camel case", () => {
    const names = factDefinitions.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    for (const name of names) expect(name).toMatch(/^[a-z][A-Za-z]*$/);
  });

  it("ends the name of a fact in seconds, GiB or µs with its unit", () => {
    const endings: Record<string, string> = { s: "Seconds", GiB: "GiB", "µs": "Microseconds" };
    for (const { name, unit } of factDefinitions) {
      const ending = endings[unit];
      if (ending) expect(name.endsWith(ending), name).toBe(true);
    }
  });

  it.each([
    ["discretisation", discretisations],
    ["meshFamily", meshFamilies],
    ["contrastPattern", contrastPatterns],
    ["boundary", boundaries],
    ["priority", priorities],
    ["available", capabilities],
  ])("allows %s exactly what the questionnaire does", (name, answers) => {
    expect(findFact(name)?.allowed).toEqual(answers);
  });

  it("refuses facts that are not complete", () => {
    expect(() => parseFacts({ degree: 1 })).toThrow(/discretisation is missing/);
  });
});
