import type { Discretisation } from "@/lib/questionnaire/answer-sets";
import type { Answers } from "@/lib/questionnaire/answers";
import type { SpectralInterval } from "@/lib/strategies/cost";
import { elementIntervals } from "./spectral-table";

type SpectralAnswers = Pick<Answers, "discretisation" | "degree" | "meshFamily" | "anisotropy" | "aspectRatio">;

/**
 * Spectral interval [d1, d2] of diag(A)^-1 A. The extreme eigenvalues of the cells bound those of the assembled matrix (Wathen, IMA J. Numer. Anal. 7(4), 1987);
 * neither h nor a coefficient that is constant in each cell moves them. Cells out of shape widen the interval: a stretch by r (of the cell, or of the
 * coefficient's principal directions, which is the same by a change of variables with r the square root of their ratio).
 */
export function spectralInterval(answers: SpectralAnswers): SpectralInterval {
  const entry = elementIntervals(answers.discretisation, answers.degree, shapeOf(answers));
  const stretch = answers.aspectRatio * Math.sqrt(answers.anisotropy);
  if (stretch === 1 || isBoxAligned(answers.discretisation, answers.meshFamily)) return entry;
  return {
    low: entry.low / stretch,
    high: entry.high,
    computed: false,
    source: `${entry.source}; lower end divided by the stretch ${stretch.toPrecision(3)} (surrogate, a pilot trial tells better)`,
  };
}

export const cellShapes = ["cube", "tetrahedron", "jittered", "octahedron", "voronoi"] as const;
export type CellShape = (typeof cellShapes)[number];

/** On boxes the tensor-product element falls apart into directions, whatever the box's proportions. */
function isBoxAligned(discretisation: Discretisation, meshFamily: Answers["meshFamily"]): boolean {
  return discretisation === "rt-hex" && meshFamily === "cubes";
}

function shapeOf({ discretisation, meshFamily }: SpectralAnswers): CellShape {
  if (meshFamily === "distorted" || meshFamily === "imported") return discretisation === "vem-mixed" ? "voronoi" : "jittered";
  const shapes = {
    cubes: "cube",
    tetrahedra: "tetrahedron",
    "truncated-octahedra": "octahedron",
    voronoi: "voronoi",
    "voronoi-relaxed": "octahedron",
  } as const;
  return shapes[meshFamily];
}
