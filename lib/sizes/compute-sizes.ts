import type { Answers } from "@/lib/questionnaire/answers";
import { elementDimensions } from "./element-dimensions";
import { flatCutFacesFor, importedCounts, isStructured, meshCounts, meshKindOf, type MeshCounts, type MeshKind } from "./mesh-counts";
import { countNonzeros } from "./nonzeros";
import type { Sizes } from "./sizes";

type SizeAnswers = Pick<Answers, "discretisation" | "degree" | "meshFamily" | "size" | "imported" | "domainVolume" | "boundary">;

/**
 * All that follows from the answers by counting: exact where the mesh is structured or imported, means of random meshes elsewhere. A structured mesh
 * takes the whole number n of divisions whose count is nearest to the one asked for; the smallest mesh has one cell. Counts are of unknowns
 * before any boundary condition; `eliminatedVelocityUnknowns` are those that a prescribed flux removes.
 */
export function computeSizes(answers: SizeAnswers): Sizes {
  const mesh = meshOf(answers);
  const { perFace, perCellVelocity, perCellPressure } = elementDimensions(answers.discretisation, answers.degree);
  const velocityUnknowns = perFace * mesh.faces + perCellVelocity * mesh.cells;
  const pressureUnknowns = perCellPressure * mesh.cells;
  const { schurNonzeros, ...nonzeros } = countNonzeros(answers.discretisation, answers.degree, mesh);
  return {
    cells: mesh.cells,
    faces: mesh.faces,
    boundaryFaces: mesh.boundaryFaces,
    facesPerCell: (2 * mesh.faces - mesh.boundaryFaces) / mesh.cells,
    spacing: Math.cbrt(answers.domainVolume / mesh.cells),
    divisions: mesh.divisions,
    velocityUnknowns,
    pressureUnknowns,
    unknowns: velocityUnknowns + pressureUnknowns,
    eliminatedVelocityUnknowns: answers.boundary === "flux-everywhere" ? perFace * mesh.boundaryFaces : 0,
    perFace,
    perCellVelocity,
    perCellPressure,
    nonzeros,
    schurNonzeros,
    exact: mesh.exact,
  };
}

/** s of the mesh behind the sizes: faces crossed by a flat cut per N^(2/3) cells. */
export function flatCutFacesOf(answers: SizeAnswers, sizes: Pick<Sizes, "facesPerCell">): number {
  const kind = meshKindOf(answers);
  return kind === null ? flatCutFacesFor(sizes.facesPerCell) : meshCounts(kind, 1).flatCutFaces;
}

/** The cells that the answers ask for, before rounding to a mesh; null for an imported mesh. */
export function askedCells(answers: SizeAnswers): number | null {
  const kind = meshKindOf(answers);
  if (kind === null || answers.size === undefined) return null;
  const { by, value } = answers.size;
  if (by === "cells") return value;
  if (by === "spacing") return answers.domainVolume / value ** 3;
  const size = sizeForUnknowns(answers, kind, value);
  return meshCounts(kind, size).cells;
}

function meshOf(answers: SizeAnswers): MeshCounts {
  const kind = meshKindOf(answers);
  if (kind === null) {
    const counts = answers.imported ?? { cells: 1, faces: 4, boundaryFaces: 4 };
    const facesPerCell = (2 * counts.faces - counts.boundaryFaces) / counts.cells;
    return importedCounts(counts, { flatCutFaces: flatCutFacesFor(facesPerCell), squaredSpread: 0 });
  }
  const { by, value } = answers.size ?? { by: "cells", value: 1 };
  if (by === "unknowns") return nearest(kind, sizeForUnknowns(answers, kind, value), (mesh) => unknownsOf(answers, mesh), value);
  const cells = by === "cells" ? value : answers.domainVolume / value ** 3;
  return nearest(kind, sizeForCells(kind, cells), (mesh) => mesh.cells, cells);
}

/** Of the whole sizes around `size`, the one whose count is nearest to the one asked for. */
function nearest(kind: MeshKind, size: number, count: (mesh: MeshCounts) => number, asked: number): MeshCounts {
  const below = meshCounts(kind, Math.max(1, Math.floor(size)));
  const above = meshCounts(kind, Math.max(1, Math.floor(size)) + 1);
  return Math.abs(count(above) - asked) < Math.abs(count(below) - asked) ? above : below;
}

function unknownsOf({ discretisation, degree }: SizeAnswers, mesh: MeshCounts): number {
  const { perFace, perCellVelocity, perCellPressure } = elementDimensions(discretisation, degree);
  return perFace * mesh.faces + (perCellVelocity + perCellPressure) * mesh.cells;
}

function sizeForUnknowns(answers: SizeAnswers, kind: MeshKind, unknowns: number): number {
  return bisect((size) => unknownsOf(answers, meshCounts(kind, size)), unknowns, isStructured(kind) ? 1e5 : 1e13);
}

function sizeForCells(kind: MeshKind, cells: number): number {
  return isStructured(kind) ? bisect((size) => meshCounts(kind, size).cells, cells, 1e5) : cells;
}

/** Solves count(x) = target on [0, above] for an increasing count; `above` is doubled until it is. 60 halvings of a geometric bracket. */
function bisect(count: (x: number) => number, target: number, above: number): number {
  let low = 1e-3;
  let high = above;
  for (let step = 0; step < 60 && count(high) < target; step += 1) high *= 2;
  for (let step = 0; step < 60; step += 1) {
    const middle = Math.sqrt(low * high);
    if (count(middle) < target) low = middle;
    else high = middle;
  }
  return Math.sqrt(low * high);
}
