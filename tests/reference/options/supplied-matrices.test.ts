import { describe, expect, it } from "vitest";
import { options as bddc } from "@/lib/strategies/bddc/options";
import { options as hdivAuxiliary } from "@/lib/strategies/hdiv-auxiliary/options";
import { options as hybridizedAmg } from "@/lib/strategies/hybridized-amg/options";
import { options as pMultigrid } from "@/lib/strategies/p-multigrid/options";
import { options as regularizedAmg } from "@/lib/strategies/regularized-amg/options";
import { runPetscParallel } from "../../support/petsc/run-petsc";
import { cubes } from "./cases";
import { expectSolves, jobOf, type Solve } from "./expect-solves";

const flux = "flux-everywhere";
const pressure = "pressure-somewhere";
const tolerance = 1e-8;

/** Model systems of cubes; the driver supplies what a program would. Oracle: PETSc 3.18.5, hypre 2.26.0, MUMPS 5.5.1 from Debian. */
function solve(n: number, degree: number, contrast: number, boundary: typeof flux | typeof pressure, parameters = {}): Solve {
  return { name: `${n} cubes a side, degree ${degree}, contrast ${contrast}, ${boundary}`, ...cubes({ n, degree, contrast, boundary }, tolerance, parameters) };
}

describe("options files with calling lines that supply matrices", () => {
  it("regularised: reaches the true residual with either multigrid, at degree 1 and 2, and leaves no option", () => {
    expectSolves(regularizedAmg, [
      solve(6, 1, 1, flux),
      solve(6, 1, 1, flux, { amgPackage: "boomeramg" }),
      solve(3, 2, 1, flux),
      solve(6, 1, 100, pressure),
    ]);
  }, 300_000);

  it("auxiliary space: reaches the true residual on both boundaries and leaves no option", () => {
    expectSolves(hdivAuxiliary, [solve(8, 1, 1, flux), solve(8, 1, 1e4, flux), solve(8, 1, 100, pressure)]);
  }, 300_000);

  it("hybridised: reaches the true residual of the saddle-point system at every contrast and leaves no option", () => {
    const cases = [solve(8, 1, 1, flux), solve(8, 1, 1e6, pressure), solve(8, 1, 1e4, flux), solve(4, 2, 1e4, flux)];
    expectSolves(hybridizedAmg, cases.map((one) => ({ ...one, system: { ...one.system, hybridised: true } })));
  }, 300_000);

  it("p-multigrid: reaches the true residual at degree 2 and 3 and leaves no option", () => {
    expectSolves(pMultigrid, [solve(4, 2, 1, flux), solve(4, 2, 100, pressure), solve(2, 3, 1, flux)]);
  }, 300_000);

  it.each([solve(6, 1, 1, flux), solve(8, 1, 1e4, flux), solve(8, 1, 1e6, pressure), solve(4, 2, 1, flux)])(
    "balancing by constraints on four processes: $name",
    (one) => {
      const result = runPetscParallel(jobOf(bddc, one), 4);
      expect(result.unusedOptions).toEqual([]);
      expect(result.reason).toBeGreaterThan(0);
      expect(result.iterations).toBeGreaterThan(1);
      expect(result.trueRelativeResidual).toBeLessThanOrEqual(tolerance);
    },
    300_000,
  );
});
