import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findCrossings } from "@/components/charts/crossings";
import { labelledTicks, makeLogScale } from "@/components/charts/log-scale";
import { formatSeconds, formatGib } from "@/lib/shared/format";

describe("makeLogScale", () => {
  it("puts 1, 10 and 100 at equal distances", () => {
    const scale = makeLogScale([1, 100]);
    expect([1, 10, 100].map(scale.position)).toEqual([0, 50, 100]);
  });

  it.each([
    { values: [3, 70], unit: "number", ticks: [2, 5, 10, 20, 50, 100] },
    { values: [0.003, 0.04], unit: "number", ticks: [0.002, 0.005, 0.01, 0.02, 0.05] },
    { values: [8, 90], unit: "seconds", ticks: [5, 10, 20, 60, 120] },
    { values: [0.4, 1.1], unit: "seconds", ticks: [0.2, 0.5, 1, 2] },
    { values: [3000, 90_000], unit: "seconds", ticks: [1200, 3600, 7200, 18_000, 36_000, 86_400, 172_800] },
    { values: [300, 1500], unit: "gibibytes", ticks: [200, 500, 1024, 2048] },
    { values: [7], unit: "number", ticks: [5, 10, 20] },
    { values: [], unit: "number", ticks: [1, 2, 5, 10] },
    { values: [0, -3, Number.NaN, Infinity], unit: "number", ticks: [1, 2, 5, 10] },
  ] as const)("has the ticks $ticks for $values in $unit", ({ values, unit, ticks }) => {
    expect(makeLogScale(values, unit).ticks.map((tick) => tick.value)).toEqual(ticks);
  });

  it("labels times and memory exactly: a label read back is the tick it stands at", () => {
    const sizes = { s: 1, min: 60, h: 3600, d: 86_400, MiB: 2 ** -10, GiB: 1, TiB: 2 ** 10 } as const;
    const readBack = (text: string): number => {
      const match = /^([\d.\u202f]+?)\u202f(\D+)$/u.exec(text);
      const size = Object.entries(sizes).find(([symbol]) => symbol === match?.[2])?.[1] ?? Number.NaN;
      return Number((match?.[1] ?? "").replaceAll("\u202f", "")) * size;
    };
    for (const { value } of makeLogScale([1, 8e6], "seconds").ticks) expect(readBack(formatSeconds(value))).toBeCloseTo(value, 9);
    for (const { value } of makeLogScale([0.01, 4000], "gibibytes").ticks) expect(readBack(formatGib(value))).toBeCloseTo(value, 9);
  });

  it("holds all positive values, in order, between 0 and 100, and labels few enough ticks", () => {
    const values = fc.array(fc.double({ min: 1e-9, max: 1e12, noNaN: true, noDefaultInfinity: true }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(values, fc.constantFrom("number", "seconds", "gibibytes", "ratio", "count" as const), (given, unit) => {
        const scale = makeLogScale(given, unit);
        const sorted = [...given].sort((a, b) => a - b);
        const places = sorted.map(scale.position);
        for (const value of given) expect(value >= scale.min * (1 - 1e-9) && value <= scale.max * (1 + 1e-9)).toBe(true);
        expect(places).toEqual([...places].sort((a, b) => a - b));
        expect(places.every((place) => place >= 0 && place <= 100)).toBe(true);
        expect(labelledTicks(scale).length).toBeLessThanOrEqual(10);
        expect(labelledTicks(scale).filter((label) => label.narrow).length).toBeLessThanOrEqual(5);
      }),
      { seed: 20261201, numRuns: 500 },
    );
  });
});

describe("findCrossings", () => {
  const line = (id: string, factor: number, power: number) => ({
    id,
    points: [1e3, 1e5].map((x) => ({ x, low: 0, median: factor * x ** power, high: 1 })),
  });

  it("finds where two power laws meet: x = (b / a)^(1 / (p - q)), by hand", () => {
    const [crossing, ...others] = findCrossings([line("steep", 1e-6, 2), line("flat", 1e-2, 1)]);
    expect(others).toEqual([]);
    expect(crossing?.x).toBeCloseTo(1e4, 6);
    expect(crossing?.y).toBeCloseTo(1e2, 6);
    expect([crossing?.first, crossing?.second]).toEqual(["steep", "flat"]);
  });

  it("finds none between parallel lines, outside the common stretch, or for a series without points", () => {
    expect(findCrossings([line("a", 1, 1), line("b", 2, 1), { id: "c", points: [] }])).toEqual([]);
    const short = { id: "short", points: [{ x: 1, low: 0, median: 5, high: 9 }] };
    expect(findCrossings([line("a", 1, 1), short])).toEqual([]);
  });
});
