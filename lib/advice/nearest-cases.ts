import { formatNumber, formatSeconds, formatSi } from "@/lib/shared/format";
import type { NearestCase } from "./advice";
import { scaledFeatures, type EvidenceFeatures } from "./evidence-features";

/** A past case with at least one converged run; `best` is the fastest of them. */
export type RecordedCase = {
  id: string;
  number: number;
  title: string;
  features: EvidenceFeatures;
  runs: number;
  best: { strategy: string; totalSeconds: number };
};

/** How many are shown. */
export const nearestCaseCount = 3;

/**
 * The three nearest past cases, nearest first, ties by number. Distance: the root of the summed squares of the differences in the scaled
 * features (a decade of unknowns, a degree, three decades of contrast and a factor of eight in cores each count 1), plus 1 for another
 * mesh family and 1 for another discretisation. `exceptId` leaves out the case itself.
 */
export function nearestCases(features: EvidenceFeatures, recorded: readonly RecordedCase[], exceptId: string | null = null): NearestCase[] {
  return recorded
    .filter(({ id }) => id !== exceptId)
    .map((past) => ({ past, distance: caseDistance(features, past.features) }))
    .sort((a, b) => a.distance - b.distance || a.past.number - b.past.number)
    .slice(0, nearestCaseCount)
    .map(({ past, distance }) => ({
      id: past.id,
      number: past.number,
      title: past.title,
      distance,
      bestStrategy: past.best.strategy,
      text: describeCase(past),
    }));
}

export function caseDistance(one: EvidenceFeatures, other: EvidenceFeatures): number {
  const there = scaledFeatures(other);
  const squares = scaledFeatures(one).reduce((sum, value, j) => sum + (value - (there[j] ?? value)) ** 2, 0);
  const strange = Number(one.meshFamily !== other.meshFamily) + Number(one.discretisation !== other.discretisation);
  return Math.sqrt(squares + strange);
}

function describeCase({ features, runs, best }: RecordedCase): string {
  const { unknowns, degree, meshFamily, contrastRatio, cores } = features;
  const contrast = contrastRatio > 1 ? `, contrast ${formatNumber(contrastRatio)}` : "";
  const mesh = meshFamily.replaceAll("-", " ");
  const measured = runs === 1 ? "its one run" : `the best of ${runs} runs`;
  return `${formatSi(unknowns)} unknowns, degree ${degree}, ${mesh}${contrast}, ${cores} ${cores === 1 ? "core" : "cores"}: ${best.strategy} took ${formatSeconds(best.totalSeconds)}, ${measured}.`;
}
