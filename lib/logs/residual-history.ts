import type { MonitorLine } from "@/lib/logs/monitor-line";
import type { ResidualPoint } from "@/lib/logs/parsed-log";

/**
 * Residuals of one solve in bounded memory: beyond `limit` points every second one is dropped and only every second of
 * the following is taken, as often as need be. The first and the last point are always kept.
 */
export function createResidualHistory(limit: number) {
  let points: ResidualPoint[] = [];
  let stride = 1;
  let taken = 0;
  let last: ResidualPoint | null = null;
  return {
    add(entry: MonitorLine): void {
      if (!Number.isFinite(entry.monitored)) return;
      const { iteration, monitored } = entry;
      const point = { iteration, monitored, true: finiteOrNull(entry.trueNorm), trueRelative: finiteOrNull(entry.trueRelative) };
      if (taken % stride === 0) points.push(point);
      last = point;
      taken += 1;
      if (points.length > limit) {
        points = points.filter((_, index) => index % 2 === 0);
        stride *= 2;
      }
    },
    get stride() {
      return stride;
    },
    points(): ResidualPoint[] {
      const tail = points[points.length - 1];
      return last === null || tail === last ? [...points] : [...points, last];
    },
  };
}
export type ResidualHistory = ReturnType<typeof createResidualHistory>;

function finiteOrNull(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null;
}
