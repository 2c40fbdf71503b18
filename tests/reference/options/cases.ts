import type { SystemSpec } from "../../support/petsc/run-petsc";
import { optionsContext } from "../../support/petsc/options-context";

type Measured = { name: string; discretisation: "rt" | "bdm" | "rt-hex"; degree: number; cells: number; velocity: number; pressure: number; contrast: number; flux: boolean };

/** The copied measured systems; counts and coefficients as their README states them. */
export const measuredSystems: readonly Measured[] = [
  { name: "tet4-RT1-un1-flux", discretisation: "rt", degree: 1, cells: 384, velocity: 672, pressure: 384, contrast: 1, flux: true },
  { name: "tet4-RT1-cb1e4-flux", discretisation: "rt", degree: 1, cells: 384, velocity: 672, pressure: 384, contrast: 1e4, flux: true },
  { name: "tet4-RT1-cb1e6-pres", discretisation: "rt", degree: 1, cells: 384, velocity: 864, pressure: 384, contrast: 1e6, flux: false },
  { name: "tet4-RT2-un1-flux", discretisation: "rt", degree: 2, cells: 384, velocity: 3168, pressure: 1536, contrast: 1, flux: true },
  { name: "tet4-BDM1-cb1e4-flux", discretisation: "bdm", degree: 1, cells: 384, velocity: 2016, pressure: 384, contrast: 1e4, flux: true },
  { name: "tet2-BDM2-un1-flux", discretisation: "bdm", degree: 2, cells: 48, velocity: 720, pressure: 192, contrast: 1, flux: true },
  { name: "hex8-NCF1-cb1e4-flux", discretisation: "rt-hex", degree: 1, cells: 512, velocity: 1344, pressure: 512, contrast: 1e4, flux: true },
  { name: "hex8-NCF1-ly1e6-pres", discretisation: "rt-hex", degree: 1, cells: 512, velocity: 1728, pressure: 512, contrast: 1e6, flux: false },
  { name: "hex4-NCF2-cb1e4-flux", discretisation: "rt-hex", degree: 2, cells: 64, velocity: 1344, pressure: 512, contrast: 1e4, flux: true },
];

/** The random right-hand side, where the true residual lags most; with default parameters also the wells of the systems where it does at contrast. */
export function rightHandSides({ name, contrast }: Measured, parameters: Record<string, number | string>): readonly ("wells" | "random")[] {
  const both = Object.keys(parameters).length === 0 && contrast > 1 && name !== "hex4-NCF2-cb1e4-flux";
  return both ? ["wells", "random"] : ["random"];
}

export function measuredContext(system: Measured, tolerance: number, parameters: Record<string, number | string> = {}) {
  return optionsContext({
    discretisation: system.discretisation,
    meshFamily: system.discretisation === "rt-hex" ? "cubes" : "tetrahedra",
    degree: system.degree,
    contrast: system.contrast,
    boundary: system.flux ? "flux-everywhere" : "pressure-somewhere",
    tolerance,
    cells: system.cells,
    velocityUnknowns: system.velocity,
    pressureUnknowns: system.pressure,
    iterationsHigh: 120 * system.degree,
    parameters,
  });
}

type Model = { n: number; degree: number; contrast: number; boundary: "flux-everywhere" | "pressure-somewhere" };

/** A model system of cubes and what its options are written from. */
export function cubes({ n, degree, contrast, boundary }: Model, tolerance: number, parameters: Record<string, number | string> = {}) {
  const system: SystemSpec = { kind: "hexahedra", n, degree, contrast, pattern: "blocks", boundary, rhs: "random" };
  const cells = n ** 3;
  const context = optionsContext({
    discretisation: "rt-hex",
    degree,
    contrast,
    boundary,
    tolerance,
    cells,
    velocityUnknowns: 3 * degree ** 2 * n ** 2 * (n * degree + 1),
    pressureUnknowns: cells * degree ** 3,
    iterationsHigh: 150 * degree,
    parameters,
  });
  return { system, context };
}
