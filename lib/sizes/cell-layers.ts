import type { Answers } from "@/lib/questionnaire/answers";
import { flatCutFacesFor, flatCuts, meshKindOf, type MeshKind } from "./mesh-counts";
import type { Sizes } from "./sizes";

/**
 * Cells in a layer that separates a mesh flatly, per N^(2/3) cells. Cubes: one a lattice square; tetrahedra: those with a face on the cut; truncated octahedra:
 * the two that a lattice plane crosses, 2/2^(2/3); Poisson-Voronoi: cells hit by a plane, 1.458 (from memory, also the intensity of the planar section);
 * centroidal: 1.35, own computation.
 */
const layers: Record<MeshKind, number> = {
  cubes: 1,
  tetrahedra: flatCuts.tetrahedra,
  "truncated-octahedra": 2 ** (1 / 3),
  voronoi: 1.458,
  "voronoi-relaxed": 1.35,
};

export function cellsInLayerOf(answers: Pick<Answers, "meshFamily" | "discretisation">, sizes: Pick<Sizes, "facesPerCell">): number {
  const kind = meshKindOf(answers);
  return kind === null ? Math.min(layers.voronoi, flatCutFacesFor(sizes.facesPerCell)) : layers[kind];
}
