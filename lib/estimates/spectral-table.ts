import type { Discretisation } from "@/lib/questionnaire/answer-sets";
import type { SpectralInterval } from "@/lib/strategies/cost";

/** Shapes of cells that the table knows. */
export const cellShapes = ["cube", "tetrahedron", "jittered", "octahedron", "relaxed", "voronoi", "distorted"] as const;
export type CellShape = (typeof cellShapes)[number];

type Interval = readonly [number, number];
type Entry = { intervals: readonly Interval[]; computed: readonly number[]; source: string };

/**
 * Smallest and largest eigenvalue of diag(A_K)^-1 A_K over the cells K, by element, shape and degree (the first entry is degree 1). Degrees listed in `computed`
 * come from local matrices (lib/numerics/elements; the tests compute the quick ones again); they hold for every mesh of such cells and any coefficient that is
 * constant in each. The others are taken from assembled reference systems or carried on, and bound nothing.
 */
export function elementInterval(discretisation: Discretisation, degree: number, shape: CellShape): SpectralInterval {
  const entry = table[discretisation][shape] ?? table[discretisation][fallbackShape[discretisation]] ?? unknownEntry;
  const [low, high] = entry.intervals[degree - 1] ?? unknownEntry.intervals[0] ?? [1, 1];
  return { low, high, source: entry.source, computed: entry.computed.includes(degree) };
}

const unknownEntry: Entry = { intervals: [[0.01, 10]], computed: [], source: "No data" };

const fallbackShape: Record<Discretisation, CellShape> = { rt: "jittered", bdm: "jittered", "rt-hex": "jittered", "vem-mixed": "voronoi" };

const table: Record<Discretisation, Partial<Record<CellShape, Entry>>> = {
  rt: {
    tetrahedron: {
      intervals: [
        [0.5, 2],
        [0.1033, 2.991],
        [0.0975, 3.2585],
        [0.07, 3.7],
        [0.055, 4.1],
        [0.045, 4.5],
      ],
      computed: [1],
      source: "Kuhn tetrahedra: local matrix at degree 1, assembled reference systems at degrees 2 and 3, carried on above",
    },
    jittered: {
      intervals: [
        [0.2127, 2.243],
        [0.0323, 3.145],
        [0.03, 3.6],
        [0.022, 4.1],
        [0.017, 4.5],
        [0.014, 4.9],
      ],
      computed: [],
      source: "Tetrahedra jittered by 0.2 h: assembled reference systems at degrees 1 and 2, carried on above",
    },
  },
  bdm: {
    tetrahedron: {
      intervals: [
        [0.1012, 4.8045],
        [0.1298, 3.4206],
        [0.025, 4.9],
        [0.02, 5.3],
        [0.016, 5.7],
        [0.013, 6.1],
      ],
      computed: [1],
      source: "Kuhn tetrahedra: local matrix at degree 1 over all orders of corners, an assembled reference system at degree 2, counts of reference runs at degree 3, carried on above",
    },
    jittered: {
      intervals: [
        [0.0506, 5.3],
        [0.05, 4],
        [0.01, 5.5],
        [0.008, 6],
        [0.0065, 6.4],
        [0.0055, 6.8],
      ],
      computed: [],
      source: "Tetrahedra jittered by 0.2 h: sample of local matrices at degree 1, carried on above",
    },
  },
  "rt-hex": {
    cube: {
      intervals: [
        [0.5, 1.5],
        [0.1938, 2.4186],
        [0.2529, 3.0861],
        [0.2646, 4.0067],
        [0.2599, 4.6378],
        [0.25, 5.3736],
      ],
      computed: [1, 2, 3, 4, 5, 6],
      source: "Boxes: local matrices, Legendre moments on faces, Legendre by nodal moments inside",
    },
    jittered: {
      intervals: [
        [0.25, 1.7],
        [0.09, 2.7],
        [0.11, 3.4],
        [0.11, 4.4],
        [0.11, 5.1],
        [0.1, 5.9],
      ],
      computed: [],
      source: "Distorted hexahedra: those of boxes, widened as jittered tetrahedra are",
    },
  },
  "vem-mixed": {
    cube: {
      intervals: [
        [0.1726, 2.3199],
        [0.1515, 2.8326],
        [0.0785, 2.6077],
        [0.068, 3.3286],
        [0.045, 3.6],
        [0.038, 4],
      ],
      computed: [1, 2, 3, 4],
      source: "Cubes: local matrices, orthonormal moments, stabilised by the normal fluxes; carried on above degree 4",
    },
    tetrahedron: {
      intervals: [
        [0.0554, 4.2927],
        [0.0422, 4.786],
        [0.0323, 6.5195],
        [0.027, 7.5],
        [0.023, 8.3],
        [0.02, 9],
      ],
      computed: [1, 2, 3],
      source: "Kuhn tetrahedra: local matrices, orthonormal moments, stabilised by the normal fluxes; carried on above degree 3",
    },
    octahedron: {
      intervals: [
        [0.3228, 1.8131],
        [0.266, 2.161],
        [0.21, 2.5],
        [0.17, 2.9],
        [0.14, 3.2],
        [0.12, 3.5],
      ],
      computed: [1, 2],
      source: "Truncated octahedra: local matrices, orthonormal moments, stabilised by the normal fluxes; carried on above degree 2",
    },
    relaxed: {
      intervals: [
        [0.3, 2],
        [0.22, 2.6],
        [0.17, 3.1],
        [0.14, 3.5],
        [0.12, 3.8],
        [0.1, 4.1],
      ],
      computed: [],
      source: "Centroidal cells: assembled mesh of 56 cells at degree 1, rounded outwards; carried on as truncated octahedra go",
    },
    voronoi: {
      intervals: [
        [0.2117, 2.9622],
        [0.1804, 3.1456],
        [0.12, 4],
        [0.09, 4.7],
        [0.07, 5.3],
        [0.06, 5.8],
      ],
      computed: [],
      source: "Poisson-Voronoi cells: assembled meshes of 56 cells at degree 1 and 24 at degree 2, carried on above; extreme cells get worse as their number grows",
    },
    distorted: {
      intervals: [
        [0.1, 4.9],
        [0.09, 4.9],
        [0.06, 5.6],
        [0.045, 6.3],
        [0.036, 7],
        [0.03, 7.6],
      ],
      computed: [],
      source: "Polyhedra with short edges and small faces: the worst of 56 Poisson-Voronoi cells at degree 1 and of 24 at degree 2, carried on above",
    },
  },
};
