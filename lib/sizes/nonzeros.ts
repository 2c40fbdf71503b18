import type { Discretisation } from "@/lib/questionnaire/answer-sets";
import { elementDimensions, polynomials2 } from "./element-dimensions";
import type { MeshCounts } from "./mesh-counts";

/**
 * Structural nonzeros, full symmetric storage, all faces counted.
 * A: two velocity unknowns couple when they share a cell, so the sum over cells of (local unknowns)^2, less the face-by-face blocks that two cells
 * share. B: only where the divergence couples (see `divergenceCouplings`). Schur: B diag(A)^-1 Bᵀ couples a cell with itself and its face neighbours.
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
    schurNonzeros: Math.round(perCellPressure ** 2 * (mesh.cells + 2 * innerFaces)),
  };
}

/**
 * Entries of B per side of a cell and inside it. Integrating by parts, (div v, q) = sum of face moments of v.n against q less the moments of
 * v against grad q. With modal pressures a q of degree d meets the face moments of degree <= d; inside, virtual elements meet one gradient moment for
 * each q of degree >= 1, the others the moments of the components of grad q, one for each variable in q. Tensor-product elements with nodal
 * pressures (as the reference runs have): every q on a face meets its r^2 moments, and r-1 moments inside for each direction.
 */
function divergenceCouplings(discretisation: Discretisation, degree: number): { perSide: number; perCell: number } {
  if (discretisation === "rt-hex") {
    const r = degree;
    return { perSide: r ** 4, perCell: 3 * (r - 1) * r ** 3 };
  }
  let perSide = 0;
  let perCell = 0;
  for (let d = 0; d < degree; d += 1) {
    const modes = polynomials2(d);
    perSide += modes * polynomials2(d);
    if (d >= 1) perCell += discretisation === "vem-mixed" ? modes : gradientEntries(d);
  }
  return { perSide, perCell };
}

/** Sum over the monomials of degree d of the number of variables they hold: each of three variables is in polynomials2(d - 1) of them. */
function gradientEntries(degree: number): number {
  return 3 * polynomials2(degree - 1);
}
