import { describe, expect, it } from "vitest";
import { holds, mustHoldFigures } from "./harness/must-hold";

// Against tests/reference/data/runs.csv: real libraries on one machine, see the README beside it. The facts of the trade on many cores (advantage over the direct
// solver, iterations against processes) are common practice, no source.
describe("The estimates hold up against the reference runs", () => {
  const figures = mustHoldFigures();

  it.each(figures.map((figure) => [figure.name, figure] as const))("%s", (_name, figure) => {
    expect(figure.value).toBeGreaterThanOrEqual(figure.lowest);
    expect(figure.value).toBeLessThanOrEqual(figure.highest);
    expect(holds(figure)).toBe(true);
  });
});
