import { describe, expect, it } from "vitest";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { convergenceOrders } from "@/lib/sizes/convergence-orders";
import { caseOf } from "./harness/predict-run";
import { readRuns, readTable } from "./harness/read-runs";

describe("Sizes of the measured systems", () => {
  const systems = new Map(
    readRuns().flatMap((run) => {
      const runCase = caseOf(run);
      return runCase ? [[`${run.mesh_family} ${run.family}${run.degree} n=${run.n_div} ${run.bc}`, { run, sizes: computeSizes(runCase.answers) }] as const] : [];
    }),
  );

  it.each([...systems])("%s: cells, faces and unknowns are those that DOLFINx counted", (_name, { run, sizes }) => {
    expect(sizes).toMatchObject({ cells: run.cells, faces: run.faces, boundaryFaces: run.faces_boundary, divisions: run.n_div });
    expect(sizes.velocityUnknowns - sizes.eliminatedVelocityUnknowns).toBe(run.unknowns_velocity);
    expect(sizes.pressureUnknowns).toBe(run.unknowns_pressure);
  });

  // Entries of A that happen to vanish are dropped in the measured matrices, so the structural count is an upper one; bases differ in B above lowest order.
  it.each([...systems].filter(([, { run }]) => run.bc === "pressure"))("%s: nonzeros are within 15 %% of the assembled ones", (_name, { run, sizes }) => {
    if (run.contrast === 1) expect(sizes.nonzeros.velocityBlock / run.nnz_A).toBeCloseTo(1, 0.5);
    expect(sizes.nonzeros.velocityBlock / run.nnz_A).toBeGreaterThanOrEqual(1);
    expect(Math.abs(Math.log(sizes.nonzeros.divergenceBlock / run.nnz_B))).toBeLessThan(0.15);
  });
});

describe("Orders of convergence", () => {
  const discretisations = { RT: "rt", BDM: "bdm", NCF: "rt-hex" } as const;
  const finest = new Map(
    readTable("verify.csv").flatMap((row) => {
      const family = row.fam;
      if ((family !== "RT" && family !== "BDM" && family !== "NCF") || row.rate_u === "" || row.patch !== "") return [];
      return [[`${row.mesh} ${family}${row.k} ${row.bc}`, { family, degree: Number(row.k), velocity: Number(row.rate_u), pressure: Number(row.rate_p) }] as const];
    }),
  );

  // verify.csv: errors against a smooth solution on the finest pair of meshes; unstructured meshes scatter by a tenth.
  it.each([...finest])("%s: the orders stated are those measured", (_name, { family, degree, velocity, pressure }) => {
    const stated = convergenceOrders(discretisations[family], degree);
    expect(Math.abs(velocity - stated.velocity)).toBeLessThan(0.15);
    expect(Math.abs(pressure - stated.pressure)).toBeLessThan(0.15);
  });

  // Beirao da Veiga, Brezzi, Marini & Russo, Numer. Math. 133, 2016: common knowledge of the method, not measured here.
  it("mixed virtual elements of degree k converge with k + 1 in the velocity and k in the pressure", () => {
    expect(convergenceOrders("vem-mixed", 2)).toEqual({ velocity: 3, pressure: 2 });
  });
});
