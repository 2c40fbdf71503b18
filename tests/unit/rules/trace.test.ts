import { describe, expect, it } from "vitest";
import { traceCondition } from "@/rules/trace";
import { falseTruth, trueTruth, unknownTruth } from "@/rules/truth";

describe("a condition's trace", () => {
  it("gives each part its truth and the fact value behind it", () => {
    const low = { fact: "degree", operator: "lessThan", value: 3 } as const;
    const many = { fact: "cores", operator: "greaterThan", value: 64 } as const;
    const trace = traceCondition({ all: [low, { not: many }, { any: [low, many] }] }, { degree: 2 });
    expect(trace).toEqual({
      kind: "all",
      truth: unknownTruth,
      members: [
        { kind: "comparison", comparison: low, factValue: 2, truth: trueTruth },
        { kind: "not", truth: unknownTruth, members: [{ kind: "comparison", comparison: many, factValue: null, truth: unknownTruth }] },
        {
          kind: "any",
          truth: trueTruth,
          members: [
            { kind: "comparison", comparison: low, factValue: 2, truth: trueTruth },
            { kind: "comparison", comparison: many, factValue: null, truth: unknownTruth },
          ],
        },
      ],
    });
  });

  it("shows a comparison that failed with the value it met", () => {
    const low = { fact: "degree", operator: "lessThan", value: 3 } as const;
    expect(traceCondition(low, { degree: 4 })).toEqual({ kind: "comparison", comparison: low, factValue: 4, truth: falseTruth });
  });
});
