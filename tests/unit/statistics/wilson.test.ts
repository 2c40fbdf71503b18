import { describe, expect, it } from "vitest";
import { normalQuantile } from "@/lib/numerics/statistics/normal";
import { wilsonInterval } from "@/lib/numerics/statistics/wilson";

describe("wilsonInterval", () => {
  // Newcombe, Statistics in Medicine 17, 1998, table I, method 3 (score without continuity correction), 95 %.
  it.each([
    [81, 263, 0.2553, 0.3662],
    [15, 148, 0.0624, 0.1605],
    [0, 20, 0, 0.1611],
    [1, 29, 0.0061, 0.1718],
  ])("gives Newcombe's interval for %i of %i", (successes, trials, low, high) => {
    const interval = wilsonInterval(successes, trials);
    expect(interval.low).toBeCloseTo(low, 4);
    expect(interval.high).toBeCloseTo(high, 4);
  });

  it("mirrors when successes and failures change places", () => {
    for (let x = 0; x <= 17; x++) {
      const there = wilsonInterval(x, 17);
      const back = wilsonInterval(17 - x, 17);
      expect(there.low).toBeCloseTo(1 - back.high, 14);
    }
  });

  it("ends exactly at 0 without successes and at 1 without failures", () => {
    expect(wilsonInterval(0, 7).low).toBe(0);
    expect(wilsonInterval(7, 7).high).toBe(1);
  });

  it("is the whole of [0, 1] without trials", () => {
    expect(wilsonInterval(0, 0)).toEqual({ low: 0, high: 1 });
  });

  it.each([
    [-1, 3],
    [4, 3],
    [1.5, 3],
    [Number.NaN, 3],
  ])("refuses %d of %d", (successes, trials) => {
    expect(() => wilsonInterval(successes, trials)).toThrow(RangeError);
  });
});

describe("normalQuantile", () => {
  // Abramowitz & Stegun, table 26.5 and common tables of the normal distribution.
  it.each([
    [0.5, 0],
    [0.9, 1.2815515655446],
    [0.975, 1.959963984540054],
    [0.995, 2.5758293035489],
    [1e-9, -5.997807015007],
  ])("at %d is %d", (probability, expected) => {
    expect(normalQuantile(probability)).toBeCloseTo(expected, 10);
  });
  // Wichura, Applied Statistics 37, 1988: the check values printed with AS 241.
  it.each([
    [0.25, -0.6744897501960817],
    [0.001, -3.090232306167814],
    [1e-20, -9.262340089798408],
  ])("agrees with the published check value at %d", (probability, expected) => {
    expect(normalQuantile(probability)).toBeCloseTo(expected, 12);
  });
});
