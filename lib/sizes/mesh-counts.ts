import type { Answers } from "@/lib/questionnaire/answers";

/**
 * Counts of a mesh's entities and of how they meet. `sumSquaredCellFaces` is the sum over cells of (faces of the cell)^2, from which
 * the nonzeros of the velocity block follow; `flatCutFaces` is s: faces crossed by a flat cut through N cells, per N^(2/3).
 */
export type MeshCounts = {
  cells: number;
  faces: number;
  boundaryFaces: number;
  sumSquaredCellFaces: number;
  flatCutFaces: number;
  divisions: number | null;
  exact: boolean;
};

export const meshKinds = ["cubes", "tetrahedra", "truncated-octahedra", "voronoi", "voronoi-relaxed"] as const;
/** What a mesh is made of, whatever the shape of its cells. */
export type MeshKind = (typeof meshKinds)[number];

/** Counts of a mesh of about `size`: divisions n of a structured kind (a whole number), cells of a random one. */
export function meshCounts(kind: MeshKind, size: number): MeshCounts {
  return counters[kind](size);
}

/** The kind of mesh behind the answers; null for an imported one. Distorted meshes keep the topology of what they distort. */
export function meshKindOf(answers: Pick<Answers, "meshFamily" | "discretisation">): MeshKind | null {
  if (answers.meshFamily === "imported") return null;
  if (answers.meshFamily !== "distorted") return answers.meshFamily;
  if (answers.discretisation === "vem-mixed") return "voronoi";
  return answers.discretisation === "rt-hex" ? "cubes" : "tetrahedra";
}

export function isStructured(kind: MeshKind): boolean {
  return kind === "cubes" || kind === "tetrahedra" || kind === "truncated-octahedra";
}

/** Counts of an imported mesh. Its cells' spread of face numbers is not known: `squaredSpread` is the variance assumed. */
export function importedCounts(
  { cells, faces, boundaryFaces }: { cells: number; faces: number; boundaryFaces: number },
  { flatCutFaces, squaredSpread }: { flatCutFaces: number; squaredSpread: number },
): MeshCounts {
  const perCell = (2 * faces - boundaryFaces) / cells;
  const sumSquaredCellFaces = cells * (perCell * perCell + squaredSpread);
  return { cells, faces, boundaryFaces, sumSquaredCellFaces, flatCutFaces, divisions: null, exact: true };
}

/**
 * s of a mesh of which only the mean number of faces per cell is known: through the values of cubes (6 faces: 1), truncated
 * octahedra (14: 3.780) and Poisson-Voronoi cells (15.535: 4.99), linear between; tetrahedra have 0.606 at 4 faces.
 */
export function flatCutFacesFor(facesPerCell: number): number {
  const points = [
    [4, flatCuts.tetrahedra],
    [6, flatCuts.cubes],
    [14, flatCuts["truncated-octahedra"]],
    [meanFaces.poissonVoronoi, flatCuts.voronoi],
  ] as const;
  let [x0, y0]: readonly [number, number] = points[0];
  if (facesPerCell <= x0) return y0;
  for (const [x1, y1] of points) {
    if (facesPerCell <= x1 && x1 > x0) return y0 + ((facesPerCell - x0) / (x1 - x0)) * (y1 - y0);
    [x0, y0] = [x1, y1];
  }
  return y0 * (facesPerCell / x0);
}

/**
 * Faces crossed by a flat cut per N^(2/3) cells. Cubes: one face a lattice square. Truncated octahedra: 4 hexagons and 2 squares a lattice
 * square of two cells, 6/2^(2/3). Kuhn tetrahedra: two triangles a lattice square, six tetrahedra a cube, 2/6^(2/3). Voronoi: mean of |dx| over
 * the edges of the Delaunay triangulation, 4.99 for Poisson seeds (periodic, 8 000 points), 4.25 for centroidal ones (own computation, 4 000
 * seeds, 60 Lloyd steps, boundary layer extrapolated away).
 */
export const flatCuts: Record<MeshKind, number> = {
  cubes: 1,
  tetrahedra: 2 / 6 ** (2 / 3),
  "truncated-octahedra": 6 / 2 ** (2 / 3),
  voronoi: 4.99,
  "voronoi-relaxed": 4.25,
};

/**
 * Mean faces of a cell. Poisson-Voronoi: 48 pi^2/35 + 2 (Meijering, Philips Res. Rep. 8, 1953). Centroidal: 14.2, own computation
 * (1 000 and 4 000 seeds, 60 Lloyd steps, extrapolated to the bulk).
 */
export const meanFaces = { poissonVoronoi: (48 * Math.PI ** 2) / 35 + 2, relaxedVoronoi: 14.2 } as const;

const counters: Record<MeshKind, (size: number) => MeshCounts> = {
  cubes: (n) => ({
    cells: n ** 3,
    faces: 3 * n * n * (n + 1),
    boundaryFaces: 6 * n * n,
    sumSquaredCellFaces: 36 * n ** 3,
    flatCutFaces: flatCuts.cubes,
    divisions: n,
    exact: true,
  }),
  tetrahedra: (n) => ({
    cells: 6 * n ** 3,
    faces: 12 * n ** 3 + 6 * n * n,
    boundaryFaces: 12 * n * n,
    sumSquaredCellFaces: 16 * 6 * n ** 3,
    flatCutFaces: flatCuts.tetrahedra,
    divisions: n,
    exact: true,
  }),
  "truncated-octahedra": truncatedOctahedra,
  voronoi: (cells) => randomVoronoi(cells, meanFaces.poissonVoronoi, 16.8, 11.7, flatCuts.voronoi),
  "voronoi-relaxed": (cells) => randomVoronoi(cells, meanFaces.relaxedVoronoi, 15.2, 3.9, flatCuts["voronoi-relaxed"]),
};

/**
 * Body-centred lattice of seeds at the corners and centres of n^3 cubes, cut flat at the box: n^3 whole octahedra around the centres, (n+1)^3 around
 * the corners, cut in half on a side, in quarters on an edge, in eighths at a corner of the box. A corner cell inside has 14 faces, on a side 10
 * (4 hexagons, 1 + 4 squares, 1 cut), on an edge 8, at a corner 7. Hexagons: 8 to each centre. Squares: between centres 3 n^2 (n-1), between
 * corners 3 n (n+1)^2. On the boundary: a square of each outer centre, 6 n^2, and the cuts, 6 (n+1)^2.
 */
function truncatedOctahedra(n: number): MeshCounts {
  const boundaryFaces = 6 * n * n + 6 * (n + 1) ** 2;
  const inner = n - 1;
  return {
    cells: n ** 3 + (n + 1) ** 3,
    faces: 8 * n ** 3 + 3 * n * n * inner + 3 * n * (n + 1) ** 2 + boundaryFaces,
    boundaryFaces,
    sumSquaredCellFaces: 196 * (n ** 3 + inner ** 3) + 100 * 6 * inner ** 2 + 64 * 12 * inner + 49 * 8,
    flatCutFaces: flatCuts["truncated-octahedra"],
    divisions: n,
    exact: true,
  };
}

/**
 * Voronoi cells of random seeds clipped to a box: the bulk mean less a layer of cells at the boundary that grows as N^(2/3); 5.5 N^(2/3) boundary
 * faces (own computation with mirrored seeds, 1 000 to 16 000 cells). Small meshes are held to tetrahedra at least.
 */
function randomVoronoi(cells: number, perCell: number, layer: number, variance: number, flatCutFaces: number): MeshCounts {
  const surface = cells ** (2 / 3);
  const sides = Math.max(6 * cells, perCell * cells - layer * surface);
  const boundaryFaces = Math.round(Math.min(5.5 * surface, sides / 2));
  const faces = Math.max(4, Math.round((sides + boundaryFaces) / 2));
  const mean = (2 * faces - boundaryFaces) / cells;
  return { cells, faces, boundaryFaces, sumSquaredCellFaces: cells * (mean * mean + variance), flatCutFaces, divisions: null, exact: false };
}
