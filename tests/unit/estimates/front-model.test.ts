import { describe, expect, it } from "vitest";
import { constants } from "@/lib/estimates/constants";
import { directCost } from "@/lib/estimates/direct-cost";
import { dissect } from "@/lib/estimates/front-model";
import { machineModel } from "@/lib/estimates/machine-model";
import { caseAnswers } from "@/tests/support/case-answers";

const cubes = (cells: number) => dissect({ cells, perSeparatorArea: 1, perCell: 1, perCellBorder: 6 }, 1);

describe("Front model", () => {
  // Lipton, Rose & Tarjan, SIAM J. Numer. Anal. 16(2), 1979: separators of size n^(2/3) give n^(4/3) fill and n^2 flops.
  it("fill grows as n^(4/3) and flops as n^2", () => {
    const [small, large] = [cubes(2 ** 30), cubes(2 ** 36)];
    expect(Math.log2(large.entries / small.entries) / 6).toBeCloseTo(4 / 3, 2);
    expect(Math.log2(large.flops / small.flops) / 6).toBeCloseTo(2, 2);
  });

  // By hand for two cells: one separator of 2^(2/3) unknowns without border, and the two cells with 1 pivot and 6 rows.
  it("two cells are one separator and two eliminations", () => {
    const area = 2 ** (2 / 3);
    const { entries, flops, levels } = cubes(2);
    expect(levels).toHaveLength(2);
    expect(entries).toBeCloseTo(area ** 2 / 2 + 2 * (0.5 + 6), 10);
    expect(flops).toBeCloseTo(area ** 3 / 3 + 2 * (1 / 3 + 6 + 36), 10);
  });

  it("the root front holds the flat cut of the box and has no border", () => {
    const root = cubes(27_000).levels[0];
    expect(root).toMatchObject({ fronts: 1, border: 0 });
    expect(root?.pivots).toBeCloseTo(900, 8);
  });

  it("entries never fall when cells are added", () => {
    let before = 0;
    for (let cells = 1; cells < 1e7; cells = Math.ceil(cells * 1.07)) {
      const { entries } = cubes(cells);
      expect(entries).toBeGreaterThanOrEqual(before);
      before = entries;
    }
  });
});

describe("Direct solver on a machine", () => {
  const matrix = { name: "a matrix", unknowns: 1e6, nonzeros: 3e7, tree: cubes(3e5), separator: { cells: 3e5, perArea: 1, thickness: 1 } };
  const on = (cores: number, lowRank = false) => directCost(matrix, machineModel(caseAnswers({ hardware: { cores, nodes: Math.ceil(cores / 32), memoryPerNodeGiB: 128 } }).hardware, constants), constants, lowRank);

  it("the analysis is sequential, the factorisation speeds up, never by more than the cores", () => {
    const [one, many] = [on(1), on(32)];
    expect(many.analysisSeconds).toBe(one.analysisSeconds);
    expect(many.factorSeconds).toBeLessThan(one.factorSeconds / 4);
    expect(many.factorSeconds).toBeGreaterThan(one.factorSeconds / 32);
  });

  it("many processes need more memory for the same factor", () => {
    expect(on(32).entries).toBe(on(1).entries);
    expect(on(32).memoryBytes).toBeGreaterThan(on(1).memoryBytes);
  });

  it("compression saves entries and flops on large fronts and nothing on small ones", () => {
    expect(on(32, true).flops).toBeLessThan(on(32).flops);
    const small = { name: "a small matrix", unknowns: 1e3, nonzeros: 1e4, tree: cubes(500), separator: { cells: 500, perArea: 1, thickness: 1 } };
    const machine = machineModel(caseAnswers().hardware, constants);
    expect(directCost(small, machine, constants, true).entries).toBe(directCost(small, machine, constants, false).entries);
  });
});
