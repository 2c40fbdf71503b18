import { describe, expect, it } from "vitest";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { strategies } from "@/lib/strategies";
import { strategyCosts } from "@/lib/strategies/costs";
import { strategyNames } from "@/lib/strategies/strategy-names";
import { caseAnswers } from "@/tests/support/case-answers";

describe("Strategy definitions", () => {
  it.each(strategyIds)("%s stands under its own id and name, with a cost model, weak spots and another strategy to fall back on", (id) => {
    const definition = strategies[id];
    expect(definition.id).toBe(id);
    expect(definition.name).toBe(strategyNames[id]);
    expect(definition.cost).toBe(strategyCosts[id]);
    expect(definition.weakSpots.length).toBeGreaterThan(0);
    expect(definition.fallback.strategy).not.toBe(id);
    expect(definition.fallback.when).not.toBe("");
    expect(definition.needs.length).toBeGreaterThan(0);
  });

  it.each(strategyIds)("%s gives a reason wherever it is not for every discretisation", (id) => {
    const { discretisations, notForReason } = strategies[id];
    expect(notForReason === "").toBe(discretisations.length === 4);
  });

  it.each(strategyIds)("the defaults of %s lie in their ranges", (id) => {
    const answers = caseAnswers();
    const context = { answers, sizes: computeSizes(answers) };
    for (const { default: preset, range } of strategies[id].parameters) {
      const value = preset(context);
      if (typeof value === "number") {
        expect(value).toBeGreaterThanOrEqual(Number(range[0]));
        expect(value).toBeLessThanOrEqual(Number(range[1]));
      } else expect(range).toContain(value);
    }
  });

  // Common practice, no source: MINRES for a symmetric system with a symmetric positive definite preconditioner, CG for a definite one, FGMRES for the rest.
  it("the Krylov method fits the preconditioner and says which norm it monitors", () => {
    expect(strategies["schur-diag-direct"]).toMatchObject({ krylovMethod: "minres", monitoredNorm: "preconditioned" });
    expect(strategies["hybridized-amg"]).toMatchObject({ krylovMethod: "cg" });
    expect(strategies["schur-triangular"]).toMatchObject({ krylovMethod: "fgmres", monitoredNorm: "unpreconditioned" });
    expect(strategies["direct-ldlt"]).toMatchObject({ krylovMethod: "none", monitoredNorm: "none" });
  });

  it("only the auxiliary-space strategy excludes mixed virtual elements", () => {
    expect(strategyIds.filter((id) => !strategies[id].discretisations.includes("vem-mixed"))).toEqual(["hdiv-auxiliary"]);
  });
});
