import { describe, expect, it } from "vitest";
import { describeCondition, describeEffect, describeSource } from "@/rules/describe";
import type { Condition, Effect } from "@/rules/rule-schema";

describe("rules in words", () => {
  it.each<[string, Condition]>([
    ["degree is at most 2", { fact: "degree", operator: "lessThanInclusive", value: 2 }],
    [
      "degree is at most 2 and cores are more than 256",
      { all: [{ fact: "degree", operator: "lessThanInclusive", value: 2 }, { fact: "cores", operator: "greaterThan", value: 256 }] },
    ],
    [
      "cores are at least 64 and (degree is 1 or contrast is more than 1\u202f000)",
      {
        all: [
          { fact: "cores", operator: "greaterThanInclusive", value: 64 },
          { any: [{ fact: "degree", operator: "equal", value: 1 }, { fact: "contrastRatio", operator: "greaterThan", value: 1000 }] },
        ],
      },
    ],
    ["memory of all nodes is less than 64 GiB", { fact: "memoryTotalGiB", operator: "lessThan", value: 64 }],
    ["mesh family is one of voronoi, distorted", { fact: "meshFamily", operator: "in", value: ["voronoi", "distorted"] }],
    ["what the program supplies does not include unassembled-subdomains", { fact: "available", operator: "doesNotContain", value: "unassembled-subdomains" }],
    ["no time limit is given", { fact: "timeLimitGiven", operator: "notEqual", value: true }],
    ["not (degree is 1)", { not: { fact: "degree", operator: "equal", value: 1 } }],
    [
      "none of (degree is 1; cores are 1)",
      { not: { any: [{ fact: "degree", operator: "equal", value: 1 }, { fact: "cores", operator: "equal", value: 1 }] } },
    ],
    ["schur-diag-amg's predicted iterations are more than 200", { fact: "schurDiagAmgIterations", operator: "greaterThan", value: 200 }],
  ])("say %s", (words, condition) => {
    expect(describeCondition(condition)).toBe(words);
  });

  it.each<[string, Effect]>([
    ["favour bddc: expect it 2x faster than the model says", { kind: "favour", strategy: "bddc", factor: 2 }],
    ["speaks for bddc; the model already counts it", { kind: "favour", strategy: "bddc", factor: 1 }],
    ["disfavour bddc: expect 1.5x the time the model says", { kind: "disfavour", strategy: "bddc", factor: 1.5 }],
    ["exclude bddc: No subdomains.", { kind: "exclude", strategy: "bddc", reason: "No subdomains." }],
    ["set restart of bddc to 30", { kind: "set", strategy: "bddc", parameter: "restart", value: 30 }],
    ["caution: Mind the pressure.", { kind: "caution", strategy: null, text: "Mind the pressure." }],
    ["fall back from bddc to direct-ldlt when it stalls", { kind: "fallback", strategy: "bddc", to: "direct-ldlt", when: "it stalls" }],
  ])("say %s", (words, effect) => {
    expect(describeEffect(effect)).toBe(words);
  });

  it("call the trade's own knowledge by its name", () => {
    expect(describeSource({ kind: "common-practice" })).toBe("common practice, no source");
  });
});
