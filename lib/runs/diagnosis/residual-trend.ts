type Point = { iteration: number; monitored: number };

/** A stretch of nearly no progress: where it begins and the slope of log10 of the residual in decades an iteration. */
export type Stagnation = { fromIteration: number; decadesPerIteration: number; iterations: number };

const minimumPoints = 12;
/** Slower than one digit in 200 iterations counts as standing still. Common practice, no source. */
const stagnationSlope = -1 / 200;

/** Least-squares slope of log10(residual) over the iterations; NaN for fewer than two points. */
export function slopeOf(points: readonly Point[]): number {
  const usable = points.filter(({ monitored }) => monitored > 0);
  const count = usable.length;
  if (count < 2) return Number.NaN;
  const meanX = usable.reduce((sum, { iteration }) => sum + iteration, 0) / count;
  const logs = usable.map(({ monitored }) => Math.log10(monitored));
  const meanY = logs.reduce((sum, value) => sum + value, 0) / count;
  let covariance = 0;
  let variance = 0;
  usable.forEach(({ iteration }, index) => {
    covariance += (iteration - meanX) * ((logs[index] ?? 0) - meanY);
    variance += (iteration - meanX) ** 2;
  });
  return variance === 0 ? Number.NaN : covariance / variance;
}

/**
 * The stagnation at the end of a history: the longest tail, at least a quarter of the solve and 12 points, whose slope
 * is flatter than one digit in 200 iterations. Null when the residual still falls at the end.
 */
export function findStagnation(history: readonly Point[]): Stagnation | null {
  const count = history.length;
  const last = history[count - 1];
  if (count < minimumPoints || last === undefined) return null;
  let found: Stagnation | null = null;
  // Tails of growing length, 40 at most, so that long histories stay cheap.
  const step = Math.max(1, Math.floor(count / 40));
  const shortest = Math.max(minimumPoints, Math.ceil(count / 4));
  for (let length = shortest; length <= count; length += step) {
    const tail = history.slice(count - length);
    const slope = slopeOf(tail);
    // Its first third must be flat too, else the tail reaches back into the fall.
    const opening = slopeOf(tail.slice(0, Math.ceil(length / 3)));
    if (!(slope > stagnationSlope) || !(opening > stagnationSlope)) break;
    const from = tail[0]?.iteration ?? 0;
    found = { fromIteration: from, decadesPerIteration: slope, iterations: last.iteration - from };
  }
  return found;
}

/** Loss of speed behind restarts: how many stall, and the median ratio of the slopes after and before. */
export type RestartEffect = { restart: number; restarts: number; stalledRestarts: number; rateRatio: number };

/**
 * Compares the slope over the first part of each cycle of restarted GMRES with that over the last part of the cycle
 * before. A restart stalls when the slope drops to less than half. Null without two complete cycles or when fewer than
 * half of the restarts stall.
 */
export function findRestartEffect(history: readonly Point[], restart: number): RestartEffect | null {
  const last = history[history.length - 1];
  if (last === undefined || restart < 4 || last.iteration < 2 * restart) return null;
  const part = Math.max(2, Math.floor(restart / 3));
  const ratios: number[] = [];
  for (let at = restart; at + part <= last.iteration; at += restart) {
    const before = slopeBetween(history, at - part, at);
    const after = slopeBetween(history, at, at + part);
    if (before < 0) ratios.push(Math.max(0, after / before));
  }
  const stalled = ratios.filter((ratio) => ratio < 0.5).length;
  if (ratios.length === 0 || stalled * 2 < ratios.length) return null;
  const sorted = [...ratios].sort((a, b) => a - b);
  return { restart, restarts: ratios.length, stalledRestarts: stalled, rateRatio: sorted[Math.floor(sorted.length / 2)] ?? 0 };
}

function slopeBetween(history: readonly Point[], from: number, to: number): number {
  return slopeOf(history.filter(({ iteration }) => iteration >= from && iteration <= to));
}
