import { describe, expect, it } from "vitest";
import { options } from "@/lib/strategies/schur-diag-amg/options";
import { runPetscAll } from "../../support/petsc/run-petsc";
import { jobOf } from "./expect-solves";
import { cubes } from "./cases";

const job = jobOf(options, { name: "cubes", ...cubes({ n: 4, degree: 1, contrast: 1, boundary: "flux-everywhere" }, 1e-6) });

describe("the harness around PETSc", () => {
  it("sees an option that PETSc never asked for, and a solve that stopped early", () => {
    const [good, misspelt, early] = runPetscAll([
      job,
      { ...job, options: `${job.options}-ksp_rtoll 1e-3\n` },
      { ...job, options: `${job.options}-ksp_max_it 2\n` },
    ]);
    expect(good?.unusedOptions).toEqual([]);
    expect(misspelt?.unusedOptions).toEqual(["-ksp_rtoll"]);
    expect(early?.reason).toBeLessThan(0);
    expect(early?.trueRelativeResidual).toBeGreaterThan(1e-6);
  });
});
