import { expect } from "vitest";
import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { runPetscAll, type PetscJob, type PetscResult, type SystemSpec } from "../../support/petsc/run-petsc";

export type Solve = { name: string; system: SystemSpec; context: OptionsContext };

/** The job that runs a strategy's file together with its calling lines. */
export function jobOf(write: (context: OptionsContext) => OptionsFile, { system, context }: Solve): PetscJob {
  const file = write(context);
  if (file.kind !== "petsc" || file.callingLines === null) throw new Error("A PETSc file with calling lines was expected.");
  return { system, options: file.text, callingLines: file.callingLines };
}

/** Solve all and demand of each: no option left unused, blocks of the right sizes, PETSc says converged, and the true relative residual is within the tolerance. */
export function expectSolves(write: (context: OptionsContext) => OptionsFile, solves: readonly Solve[]): PetscResult[] {
  const results = runPetscAll(solves.map((solve) => jobOf(write, solve)));
  const seen = solves.map(({ name, context }, index) => {
    const result = results[index];
    const met = result !== undefined && result.trueRelativeResidual <= context.answers.tolerance;
    const { velocityUnknowns, pressureUnknowns } = context.sizes;
    const blocks = (result?.splitSizes ?? []).join(" and ");
    const right = blocks === "" || (result?.splitSizes[1] === pressureUnknowns && (result.splitSizes[0] ?? 0) <= velocityUnknowns);
    return { name, blocks: right ? "right" : blocks, unused: result?.unusedOptions, converged: (result?.reason ?? -1) > 0, residual: met ? "within" : result?.trueRelativeResidual };
  });
  expect(seen).toEqual(solves.map(({ name }) => ({ name, blocks: "right", unused: [], converged: true, residual: "within" })));
  return results;
}
