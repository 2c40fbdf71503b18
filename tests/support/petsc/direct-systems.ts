import type { OptionsContext } from "@/lib/strategies/strategy";
import { cubes, measuredContext, measuredSystems } from "../../reference/options/cases";
import { optionsContext } from "./options-context";
import type { SystemSpec } from "./run-petsc";

export type DirectSystem = { name: string; system: SystemSpec; context: OptionsContext; repeat: number };

const flux = "flux-everywhere";

/** Systems on which the direct settings are compared with the library's defaults: the copied measured ones and larger model ones. */
export function directSystems(tolerance: number): DirectSystem[] {
  return [
    ...measuredSystems.map((one) => ({
      name: one.name,
      system: { kind: "files" as const, name: one.name, rhs: "random" as const },
      context: measuredContext(one, tolerance),
      repeat: 15,
    })),
    ...[
      { n: 12, degree: 1, contrast: 1, repeat: 5 },
      { n: 16, degree: 1, contrast: 1, repeat: 2 },
      { n: 16, degree: 1, contrast: 1e4, repeat: 2 },
      { n: 20, degree: 1, contrast: 1, repeat: 1 },
      { n: 22, degree: 1, contrast: 1, repeat: 1 },
      { n: 6, degree: 2, contrast: 1, repeat: 5 },
      { n: 9, degree: 2, contrast: 1, repeat: 2 },
      { n: 9, degree: 2, contrast: 1e4, repeat: 2 },
      { n: 5, degree: 3, contrast: 1, repeat: 2 },
    ].map(({ repeat, ...model }) => ({
      name: `${model.n}^3 cubes, degree ${model.degree}, contrast ${model.contrast}`,
      ...cubes({ ...model, boundary: flux }, tolerance),
      repeat,
    })),
    ...[
      { n: 8, contrast: 1, repeat: 5 },
      { n: 12, contrast: 1, repeat: 5 },
      { n: 16, contrast: 1, repeat: 2 },
      { n: 16, contrast: 1e4, repeat: 2 },
      { n: 20, contrast: 1, repeat: 1 },
    ].map(({ n, contrast, repeat }) => ({ name: `${n}^3 x 6 tetrahedra, contrast ${contrast}`, ...tetrahedra(n, contrast, tolerance), repeat })),
  ];
}

function tetrahedra(n: number, contrast: number, tolerance: number): { system: SystemSpec; context: OptionsContext } {
  const cells = 6 * n ** 3;
  const system: SystemSpec = { kind: "tetrahedra", n, contrast, pattern: "blocks", boundary: flux, rhs: "random" };
  const context = optionsContext({
    discretisation: "rt",
    meshFamily: "tetrahedra",
    contrast,
    boundary: flux,
    tolerance,
    cells,
    velocityUnknowns: 2 * cells + 6 * n ** 2,
    pressureUnknowns: cells,
  });
  return { system, context };
}
