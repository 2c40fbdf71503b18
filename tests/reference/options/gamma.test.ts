import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { z } from "zod";
import { gammaOf } from "@/lib/strategies/petsc/parameters";
import { options } from "@/lib/strategies/regularized-amg/options";
import { optionsContext } from "../../support/petsc/options-context";

/** Measured gamma sweeps: see README.md beside this file. */
const rowSchema = z.object({
  krylov: z.string(),
  multigrid: z.string(),
  mesh: z.enum(["tet", "hex"]),
  element: z.string(),
  degree: z.coerce.number(),
  cells: z.coerce.number(),
  gamma: z.coerce.number(),
  iterations: z.coerce.number(),
});
type Row = z.infer<typeof rowSchema>;

function readRows(): Row[] {
  const path = fileURLToPath(new URL("./gamma-sweeps.csv", import.meta.url));
  const [header = "", ...lines] = readFileSync(path, "utf8").trim().split("\n");
  const names = header.split(",");
  return lines.map((line) => {
    const cells = line.split(",");
    return rowSchema.parse(Object.fromEntries(names.map((name, index) => [name, cells[index]])));
  });
}

/** Sweeps of at least four points, by solver and mesh. */
function sweeps(): { name: string; rows: Row[] }[] {
  const groups = new Map<string, Row[]>();
  for (const row of readRows()) groups.set(keyOf(row), [...(groups.get(keyOf(row)) ?? []), row]);
  return [...groups].filter(([, rows]) => rows.length >= 4).map(([name, rows]) => ({ name, rows: rows.sort((a, b) => a.gamma - b.gamma) }));
}

function keyOf(row: Row): string {
  return `${row.krylov} ${row.multigrid} ${row.mesh} ${row.element}${row.degree} ${row.cells} cells`;
}

/** Iterations at a gamma between two measured ones: linear in log iterations against log gamma. */
function iterationsAt(rows: readonly Row[], gamma: number): number {
  const above = rows.findIndex((row) => row.gamma >= gamma);
  const right = rows[above];
  const left = rows[above - 1];
  if (left === undefined || right === undefined) throw new Error("The advised gamma lies outside the sweep.");
  const share = Math.log(gamma / left.gamma) / Math.log(right.gamma / left.gamma);
  return left.iterations ** (1 - share) * right.iterations ** share;
}

function contextOf({ mesh, degree, cells }: Row) {
  const meshFamily = mesh === "tet" ? "tetrahedra" : "cubes";
  return optionsContext({ discretisation: mesh === "tet" ? "rt" : "rt-hex", meshFamily, degree, cells });
}

describe("the advised gamma", () => {
  it.each(sweeps())("lies in the flat of the measured valley, at most 15 % above the best: $name", ({ rows }) => {
    const [first] = rows;
    if (first === undefined) throw new Error("An empty sweep.");
    const best = Math.min(...rows.map((row) => row.iterations));
    expect(iterationsAt(rows, gammaOf(contextOf(first))) / best).toBeLessThanOrEqual(1.15);
  });

  it("covers every mesh of the sweeps: 21 of them", () => {
    expect(sweeps()).toHaveLength(21);
  });

  it("is proportional to h squared and inverse to the coefficient", () => {
    const coarse = gammaOf(optionsContext({ cells: 1000 }));
    expect(gammaOf(optionsContext({ cells: 8000 }))).toBeCloseTo(coarse / 4, 12);
    expect(gammaOf(optionsContext({ cells: 1000, coefficientScale: 100 }))).toBeCloseTo(coarse / 100, 12);
  });

  it("is the one that the calling lines put into the matrices", () => {
    const file = options(optionsContext({ cells: 1000 }));
    expect(file.kind === "petsc" ? file.callingLines : "").toContain("gamma = 0.004\n");
  });
});
