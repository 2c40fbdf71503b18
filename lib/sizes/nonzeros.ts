import type { Discretisation } from "@/lib/questionnaire/answer-sets";
import { elementDimensions, polynomials2 } from "./element-dimensions";
import type { MeshCounts } from "./mesh-counts";

/**
 * Structural nonzeros, full symmetric storage, all faces counted.
 * A: two velocity unknowns couple when they share a cell, so the sum over cells of (local unknowns)^2, less the face-by-face blocks that two cells
 * share. B: only where the divergence couples (see `divergenceCouplings`). Schur: B diag(A)^-1 Bᵀ couples the
 * pressures of a cell with each other and with those of its face neighbours that are seen through the face.
 */
export function countNonzeros(discretisation: Discretisation, degree: number, mesh: MeshCounts) {
  const { perFace, perCellVelocity, perCellPressure } = elementDimensions(discretisation, degree);
  const sides = 2 * mesh.faces - mesh.boundaryFaces;
  const innerFaces = mesh.faces - mesh.boundaryFaces;
  const velocityBlock =
    perFace ** 2 * mesh.sumSquaredCellFaces +
    2 * perFace * perCellVelocity * sides +
    perCellVelocity ** 2 * mesh.cells -
    perFace ** 2 * innerFaces;
  const { perSide, perCell } = divergenceCouplings(discretisation, degree);
  const divergenceBlock = perSide * sides + perCell * mesh.cells;
  return {
    velocityBlock: Math.round(velocityBlock),
    divergenceBlock: Math.round(divergenceBlock),
    total: Math.round(velocityBlock) + 2 * Math.round(divergenceBlock),
    schurNonzeros: Math.round(perCellPressure ** 2 * mesh.cells + 2 * pressuresPerFace(discretisation, degree) ** 2 * innerFaces),
  };
}

/**
 * Entries of B per side of a cell and inside it. Integrating by parts, (div v, q) = sum of face moments of v.n against q less the moments of v
 * against grad q. Virtual elements have modal pressures: a q of degree d meets the face moments of degree <= d and, from degree 1 on, its own gradient
 * moment. The others have nodal pressures, as the reference runs: those with nodes on a face meet its moments up to their degree; inside, tetrahedra
 * meet about one moment for each variable in q, tensor-product elements r - 1 moments for each direction.
 */
function divergenceCouplings(discretisation: Discretisation, degree: number): { perSide: number; perCell: number } {
  const onFace = couplingPerFace(discretisation, degree);
  if (discretisation === "rt-hex") return { perSide: onFace ** 2, perCell: 3 * (degree - 1) * degree ** 3 };
  let perSide = discretisation === "vem-mixed" ? 0 : onFace ** 2;
  let perCell = 0;
  for (let d = 0; d < degree; d += 1) {
    const modes = polynomials2(d);
    if (discretisation === "vem-mixed") perSide += modes * polynomials2(d);
    if (d >= 1) perCell += discretisation === "vem-mixed" ? modes : 3 * polynomials2(d - 1);
  }
  return { perSide, perCell };
}

/** Face moments of one face that the divergence sees: up to the pressures' degree. */
export function couplingPerFace(discretisation: Discretisation, degree: number): number {
  return discretisation === "rt-hex" ? degree ** 2 : polynomials2(degree - 1);
}

/** Pressures of a cell that neighbours see through a face: those with nodes on it, or all modal ones. */
export function pressuresPerFace(discretisation: Discretisation, degree: number): number {
  return discretisation === "vem-mixed" ? elementDimensions(discretisation, degree).perCellPressure : couplingPerFace(discretisation, degree);
}
