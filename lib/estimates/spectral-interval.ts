import type { Answers } from "@/lib/questionnaire/answers";
import type { SpectralInterval } from "@/lib/strategies/cost";
import { elementInterval, type CellShape } from "./spectral-table";

type SpectralAnswers = Pick<Answers, "discretisation" | "degree" | "meshFamily" | "anisotropy" | "aspectRatio">;

/**
 * Spectral interval [d1, d2] of diag(A)^-1 A. The extreme eigenvalues of the cells bound those of the assembled matrix (Wathen, IMA J. Numer. Anal. 7(4), 1987);
 * neither h nor a coefficient that is constant in each cell moves them. A stretch r of the cells, or of the coefficient's principal directions (a change of
 * variables by the square root of their ratio makes one of the other), lowers d1 by 1 + s (r^2 - 1) and raises d2 by at most a half: s = 0.4 for tetrahedra
 * and 0.09 for virtual elements on cubes, read off local matrices of flattened cells (r = 2 to 16). Boxes do not stretch the tensor-product element.
 */
export function spectralInterval(answers: SpectralAnswers): SpectralInterval {
  const entry = elementInterval(answers.discretisation, answers.degree, shapeOf(answers));
  const stretch = answers.aspectRatio * Math.sqrt(answers.anisotropy);
  if (stretch === 1 || (answers.discretisation === "rt-hex" && answers.meshFamily === "cubes")) return entry;
  const sensitivity = answers.discretisation === "rt" || answers.discretisation === "bdm" ? 0.4 : 0.09;
  return {
    low: entry.low / (1 + sensitivity * (stretch ** 2 - 1)),
    high: entry.high * (1.5 - 0.5 / stretch),
    computed: false,
    source: `${entry.source}; widened for a stretch of ${stretch.toPrecision(3)}`,
  };
}

function shapeOf({ discretisation, meshFamily }: SpectralAnswers): CellShape {
  const shapes = {
    cubes: "cube",
    tetrahedra: "tetrahedron",
    "truncated-octahedra": "octahedron",
    voronoi: "voronoi",
    "voronoi-relaxed": "relaxed",
    distorted: discretisation === "vem-mixed" ? "distorted" : "jittered",
    imported: discretisation === "vem-mixed" ? "voronoi" : "jittered",
  } as const;
  return shapes[meshFamily];
}
