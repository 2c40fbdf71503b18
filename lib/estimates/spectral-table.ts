import type { Discretisation } from "@/lib/questionnaire/answer-sets";
import type { SpectralInterval } from "@/lib/strategies/cost";
import type { CellShape } from "./spectral-interval";

/**
 * Extreme eigenvalues of diag(A_K)^-1 A_K for one cell K, by element, shape and degree (the first entry is degree 1). `computed` ones are recomputed by the tests from local
 * matrices, the others come from reference systems and runs.
 */
export function elementIntervals(discretisation: Discretisation, degree: number, shape: CellShape): SpectralInterval {
  const rows = intervals[discretisation];
  const [low, high] = rows[degree - 1] ?? rows[rows.length - 1] ?? [1, 1];
  const widening = shapeWidening[shape];
  const source = sources[discretisation];
  return { low: low * widening.low, high: high * widening.high, source: widening.low === 1 ? source : `${source}; ${widening.source}`, computed: false };
}

const intervals: Record<Discretisation, readonly (readonly [number, number])[]> = {
  rt: [
    [0.5, 2],
    [0.1033, 2.991],
    [0.0975, 3.2585],
    [0.065, 3.6],
    [0.05, 3.9],
    [0.04, 4.2],
  ],
  bdm: [
    [0.1066, 4.618],
    [0.1298, 3.4206],
    [0.025, 4.9],
    [0.02, 5.2],
    [0.016, 5.5],
    [0.013, 5.8],
  ],
  "rt-hex": [
    [0.5, 1.5],
    [0.1938, 2.4186],
    [0.13, 2.8],
    [0.1, 3.1],
    [0.08, 3.4],
    [0.065, 3.7],
  ],
  "vem-mixed": [
    [0.25, 2],
    [0.08, 3],
    [0.04, 4],
    [0.025, 5],
    [0.016, 6],
    [0.011, 7],
  ],
};

const sources: Record<Discretisation, string> = {
  rt: "Local matrices and assembled reference systems, basis of the reference runs",
  bdm: "Local matrices and assembled reference systems, basis of the reference runs",
  "rt-hex": "Tensor-product local matrices, basis of the reference runs",
  "vem-mixed": "Surrogate for scaled moments with the diagonal stabilisation; a pilot trial tells better",
};

const shapeWidening: Record<CellShape, { low: number; high: number; source: string }> = {
  cube: { low: 1, high: 1, source: "" },
  tetrahedron: { low: 1, high: 1, source: "" },
  octahedron: { low: 1, high: 1, source: "" },
  jittered: { low: 0.4, high: 1.1, source: "widened as the jittered reference meshes (0.2 h)" },
  voronoi: { low: 0.5, high: 1.3, source: "widened for random cells" },
};
