import { describe, expect, it } from "vitest";
import { ruleRecords } from "@/lib/refinement/rule-record";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Effect } from "@/rules/rule-schema";
import { ruleOf } from "../../support/arbitrary-rules";
import { syntheticCase } from "../../support/replay-fixtures";

const asOf = "2026-12-01T00:00:00.000Z";
const always = { fact: "degree", operator: "greaterThanInclusive", value: 1 } as const;
const favourBddc: Effect = { kind: "favour", strategy: "bddc", factor: 2 };
let number = 0;

function recordOf(first: StrategyId, outcome: "right" | "wrong" | "not run", measuredAt = "2026-11-20T00:00:00.000Z", firedRules = ["prefer-bddc"]) {
  number += 1;
  const measured = outcome === "not run" ? {} : { [first]: outcome === "right" ? 10 : null };
  return syntheticCase({ number, facts: {}, predicted: {}, measured, measuredAt, first, firedRules }).record;
}

const times = <T>(count: number, make: () => T): T[] => Array.from({ length: count }, make);

// Expected values are worked out by hand.
describe("the record of a rule", () => {
  it("counts fired, followed, right and wrong with Wilson's interval", () => {
    const records = [...times(8, () => recordOf("bddc", "right")), ...times(2, () => recordOf("bddc", "wrong")), recordOf("bddc", "not run"), recordOf("bddc", "right", undefined, ["another"])];
    const [rule] = ruleRecords(records, [ruleOf("prefer-bddc", always, [favourBddc])], asOf);
    expect(rule).toMatchObject({ ruleId: "prefer-bddc", fired: 11, followed: 10, right: { x: 8, n: 10 }, wrong: 2, overruled: 0, standing: "active" });
    // Wilson's 95 % interval of 8 in 10: Brown, Cai & DasGupta, Statist. Sci. 16(2), 2001, formula (4), by hand.
    expect(rule?.right.low).toBeCloseTo(0.4902, 4);
    expect(rule?.right.high).toBeCloseTo(0.9433, 4);
  });

  it.each([
    ["2026-11-30T00:00:00.000Z", 1, 0],
    ["2026-09-02T00:00:01.000Z", 1, 0],
    ["2026-09-02T00:00:00.000Z", 0, 1],
    ["2026-12-02T00:00:00.000Z", 0, 0],
  ])("takes a run of %s as recent: %d, earlier: %d", (measuredAt, recent, earlier) => {
    const [rule] = ruleRecords([recordOf("bddc", "right", measuredAt)], [ruleOf("prefer-bddc", always)], asOf);
    expect([rule?.recent.n, rule?.earlier.n]).toEqual([recent, earlier]);
  });

  it.each([
    [1, 20, /^Getting worse/],
    [12, 12, /^No clear drift/],
    [2, 0, /^Too few cases/],
  ])("tells the drift: %d of 20 recent right, %d of 20 earlier", (recentRight, earlierRight, text) => {
    const side = (right: number, measuredAt: string) => (right === 2 ? [recordOf("bddc", "right", measuredAt)] : [...times(right, () => recordOf("bddc", "right", measuredAt)), ...times(20 - right, () => recordOf("bddc", "wrong", measuredAt))]);
    const records = [...side(recentRight, "2026-11-01T00:00:00.000Z"), ...side(earlierRight, "2026-06-01T00:00:00.000Z")];
    const [rule] = ruleRecords(records, [ruleOf("prefer-bddc", always)], asOf);
    expect(rule?.driftText).toMatch(text);
    if (recentRight === 2) expect(rule?.drift).toBeNull();
    else expect(rule?.drift).toBeCloseTo((recentRight - earlierRight) / 20, 12);
  });

  it.each<[string, Effect, StrategyId, number | null, string]>([
    ["a favour that never comes first", favourBddc, "direct-ldlt", 5, "always-overruled"],
    ["a favour that comes first", favourBddc, "bddc", 0, "active"],
    ["a disfavour of what comes first", { kind: "disfavour", strategy: "direct-ldlt", factor: 2 }, "direct-ldlt", 5, "always-overruled"],
    ["a disfavour of another", { kind: "disfavour", strategy: "bddc", factor: 2 }, "direct-ldlt", 0, "active"],
    ["a factor of 1, which prefers nothing", { kind: "favour", strategy: "bddc", factor: 1 }, "direct-ldlt", null, "active"],
  ])("tells whether it is overruled: %s", (_name, effect, first, overruled, standing) => {
    expect(ruleRecords(times(5, () => recordOf(first, "right")), [ruleOf("prefer-bddc", always, [effect])], asOf)).toMatchObject([{ overruled, standing }]);
  });

  it("lists rules that never fire, and does not blame those switched off", () => {
    const rules = [ruleOf("idle", always, [favourBddc]), ruleOf("off", always, [favourBddc], false)];
    expect(ruleRecords([recordOf("bddc", "right")], rules, asOf).map(({ standing }) => standing)).toEqual(["never-fires", "off"]);
    expect(() => ruleRecords([], rules, "yesterday")).toThrow(RangeError);
  });
});
