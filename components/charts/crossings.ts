export type SeriesPoint = { x: number; low: number; median: number; high: number };
export type Crossing = { x: number; y: number; first: string; second: string };

/**
 * Where the medians of two series cross, each taken as straight between its points on log-log axes. Series are compared over
 * the stretch of x that both cover; touching without changing sides is no crossing.
 */
export function findCrossings(series: readonly { id: string; points: readonly SeriesPoint[] }[]): Crossing[] {
  const found: Crossing[] = [];
  series.forEach((one, index) => {
    for (const other of series.slice(index + 1)) found.push(...crossingsOf(one, other));
  });
  return found.sort((a, b) => a.x - b.x);
}

type Named = { id: string; points: readonly SeriesPoint[] };

function crossingsOf(one: Named, other: Named): Crossing[] {
  const [a, b] = [logPoints(one.points), logPoints(other.points)];
  const stops = [...new Set([...a, ...b].map((point) => point[0]))].sort((left, right) => left - right);
  const gaps = stops.flatMap((x) => {
    const [ya, yb] = [interpolate(a, x), interpolate(b, x)];
    return ya === null || yb === null || ya === yb ? [] : [{ x, y: ya, gap: ya - yb }];
  });
  return gaps.slice(1).flatMap((now, index) => {
    const before = gaps[index];
    if (before === undefined || Math.sign(before.gap) === Math.sign(now.gap)) return [];
    const share = before.gap / (before.gap - now.gap);
    return [{ x: 10 ** (before.x + share * (now.x - before.x)), y: 10 ** (before.y + share * (now.y - before.y)), first: one.id, second: other.id }];
  });
}

function logPoints(points: readonly SeriesPoint[]): [number, number][] {
  return points
    .filter((point) => point.x > 0 && point.median > 0)
    .map((point): [number, number] => [Math.log10(point.x), Math.log10(point.median)])
    .sort((left, right) => left[0] - right[0]);
}

function interpolate(points: readonly [number, number][], x: number): number | null {
  for (let index = 0; index < points.length; index += 1) {
    const [here, next] = [points[index], points[index + 1]];
    if (here === undefined) return null;
    if (here[0] === x) return here[1];
    if (next !== undefined && here[0] < x && x < next[0]) return here[1] + ((x - here[0]) / (next[0] - here[0])) * (next[1] - here[1]);
  }
  return null;
}
