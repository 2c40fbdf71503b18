import type { Answers } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { estimateOne } from "./estimate-all";

export type CurvePoint = { x: number; low: number; median: number; high: number };
export type ScalingCurve = { strategy: StrategyId; points: CurvePoint[] };
/** Where two strategies swap places: from `x` on `faster` is the faster. */
export type CrossingPoint = { x: number; seconds: number; faster: StrategyId; slower: StrategyId };

/**
 * Predicted total seconds against the cores (powers of two up to `upTo` times the asked ones, nodes growing in step) or against the unknowns (from a hundredth
 * to a hundred times the case, at the same machine).
 */
export function scalingCurves(
  answers: Answers,
  { over, strategies, points = 13 }: { over: "cores" | "unknowns"; strategies: readonly StrategyId[]; points?: number },
): ScalingCurve[] {
  const variants = over === "cores" ? coreVariants(answers) : unknownVariants(answers, points);
  return strategies.map((strategy) => ({
    strategy,
    points: variants.map((variant) => {
      const sizes = computeSizes(variant);
      const { low, median, high } = estimateOne(strategy, variant, sizes).totalSeconds;
      return { x: over === "cores" ? variant.hardware.cores : sizes.unknowns, low, median, high };
    }),
  }));
}

/** Crossing points of every pair of curves, interpolated linearly in the logarithms, by ascending x. */
export function crossingPoints(curves: readonly ScalingCurve[]): CrossingPoint[] {
  const crossings: CrossingPoint[] = [];
  curves.forEach((first, index) => {
    for (const second of curves.slice(index + 1)) crossings.push(...crossingsOf(first, second));
  });
  return crossings.sort((a, b) => a.x - b.x);
}

function crossingsOf(first: ScalingCurve, second: ScalingCurve): CrossingPoint[] {
  const found: CrossingPoint[] = [];
  let previous: { x: number; gap: number; seconds: number } | null = null;
  first.points.forEach((point, index) => {
    const other = second.points[index];
    if (!other || other.x !== point.x) return;
    const gap = Math.log(point.median / other.median);
    if (previous && previous.gap !== 0 && previous.gap * gap < 0) {
      const share = previous.gap / (previous.gap - gap);
      const x = Math.exp(Math.log(previous.x) + share * Math.log(point.x / previous.x));
      const seconds = Math.exp(Math.log(previous.seconds) + share * Math.log(point.median / previous.seconds));
      const [faster, slower] = gap < 0 ? [first.strategy, second.strategy] : [second.strategy, first.strategy];
      found.push({ x, seconds, faster, slower });
    }
    previous = { x: point.x, gap, seconds: point.median };
  });
  return found;
}

/** 1, 2, 4, ... to at least 64 and 16 times the asked cores. */
function coreVariants(answers: Answers): Answers[] {
  const most = Math.min(4_000_000, Math.max(64, answers.hardware.cores * 16));
  const counts = new Set<number>([answers.hardware.cores]);
  for (let cores = 1; cores <= most; cores *= 2) counts.add(cores);
  return [...counts].sort((a, b) => a - b).map((cores) => withCores(answers, cores));
}

function withCores(answers: Answers, cores: number): Answers {
  return { ...answers, hardware: { ...answers.hardware, cores, nodes: Math.ceil(cores / answers.hardware.coresPerNode) } };
}

function unknownVariants(answers: Answers, points: number): Answers[] {
  const sizes = computeSizes(answers);
  const variants: Answers[] = [];
  for (let index = 0; index < points; index += 1) {
    const factor = 10 ** (-2 + (4 * index) / (points - 1));
    variants.push(scaled(answers, sizes.cells, sizes.unknowns, factor));
  }
  return distinct(variants);
}

/** The case with `factor` times its unknowns; an imported mesh grows by its cells and, in two dimensions, its boundary. */
function scaled(answers: Answers, cells: number, unknowns: number, factor: number): Answers {
  if (answers.imported && answers.meshFamily === "imported") {
    const { faces, boundaryFaces } = answers.imported;
    const boundary = Math.max(4, Math.round(boundaryFaces * factor ** (2 / 3)));
    const inner = Math.max(0, Math.round((faces - boundaryFaces) * factor));
    return { ...answers, imported: { cells: Math.max(1, Math.round(cells * factor)), faces: inner + boundary, boundaryFaces: boundary } };
  }
  return { ...answers, size: { by: "unknowns", value: Math.max(1, unknowns * factor) } };
}

/** Structured meshes take whole divisions: several small sizes can be one and the same mesh. */
function distinct(variants: readonly Answers[]): Answers[] {
  const seen = new Set<number>();
  return variants.filter((variant) => {
    const { unknowns } = computeSizes(variant);
    if (seen.has(unknowns)) return false;
    seen.add(unknowns);
    return true;
  });
}
