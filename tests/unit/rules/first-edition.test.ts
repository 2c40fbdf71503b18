import { describe, expect, it } from "vitest";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { describeCondition, describeEffect } from "@/rules/describe";
import { ruleSetSchema } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";

describe("the first edition", () => {
  it("keeps its own schema, with at least 24 rules", () => {
    expect(ruleSetSchema.parse(firstEdition)).toEqual(firstEdition);
    expect(firstEdition.length).toBeGreaterThanOrEqual(24);
  });

  it.each(strategyIds)("says something about %s", (strategy) => {
    const spoken = firstEdition.filter(({ then }) => then.some((effect) => effect.strategy === strategy));
    expect(spoken.length).toBeGreaterThanOrEqual(2);
  });

  it("names the effect behind every factor other than 1, and says so where the model already counts it", () => {
    for (const { id, then, rationale } of firstEdition) {
      const factors = then.flatMap((effect) => (effect.kind === "favour" || effect.kind === "disfavour" ? [effect.factor] : []));
      if (factors.length === 0) continue;
      if (factors.every((factor) => factor === 1)) expect(rationale, id).toMatch(/already counts? this/);
      else expect(rationale, id).toMatch(/factors? stands? for/);
    }
  });

  it("can be read out, rule by rule", () => {
    for (const { when, then } of firstEdition) {
      expect(describeCondition(when)).toMatch(/ (is|are|includes|does not include) /);
      for (const effect of then) expect(describeEffect(effect).length).toBeGreaterThan(10);
    }
  });
});
