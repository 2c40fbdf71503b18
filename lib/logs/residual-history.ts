import type { MonitorLine } from "@/lib/logs/monitor-line";
import type { ResidualPoint } from "@/lib/logs/parsed-log";

const fields = 4;
const firstCapacity = 256;

/**
 * Residuals of one solve in bounded memory: beyond `limit` points every second one is dropped and only every second of
 * the following is taken, as often as need be. The first and the last point are always kept.
 */
export function createResidualHistory(limit: number) {
  // Four numbers a point: iteration, monitored norm, true norm, true relative norm; NaN where not printed.
  let values = new Float64Array(fields * firstCapacity);
  let stored = 0;
  let stride = 1;
  let taken = 0;
  let last: MonitorLine | null = null;
  let lastStored = false;

  function store(entry: MonitorLine): void {
    const at = stored * fields;
    if (at === values.length) {
      const larger = new Float64Array(2 * values.length);
      larger.set(values);
      values = larger;
    }
    values[at] = entry.iteration;
    values[at + 1] = entry.monitored;
    values[at + 2] = entry.trueNorm ?? Number.NaN;
    values[at + 3] = entry.trueRelative ?? Number.NaN;
    stored += 1;
  }

  function halve(): void {
    for (let index = 1; 2 * index < stored; index += 1) {
      values.copyWithin(index * fields, 2 * index * fields, (2 * index + 1) * fields);
    }
    // The newest point is dropped when its place is odd.
    lastStored = lastStored && stored % 2 === 1;
    stored = Math.ceil(stored / 2);
    stride *= 2;
  }

  return {
    add(entry: MonitorLine): void {
      if (!Number.isFinite(entry.monitored)) return;
      lastStored = taken % stride === 0;
      if (lastStored) store(entry);
      last = entry;
      taken += 1;
      if (stored > limit) halve();
    },
    /** Empties the history for another solve; its memory is used again. */
    reset(): void {
      stored = 0;
      stride = 1;
      taken = 0;
      last = null;
      lastStored = false;
    },
    get stride() {
      return stride;
    },
    points(): ResidualPoint[] {
      const points: ResidualPoint[] = [];
      for (let index = 0; index < stored * fields; index += fields) {
        const [iteration = 0, monitored = 0, trueNorm = Number.NaN, trueRelative = Number.NaN] = values.subarray(index, index + fields);
        points.push({ iteration, monitored, true: finiteOrNull(trueNorm), trueRelative: finiteOrNull(trueRelative) });
      }
      if (last !== null && !lastStored) {
        const { iteration, monitored, trueNorm, trueRelative } = last;
        points.push({ iteration, monitored, true: finiteOrNull(trueNorm), trueRelative: finiteOrNull(trueRelative) });
      }
      return points;
    },
  };
}
export type ResidualHistory = ReturnType<typeof createResidualHistory>;

function finiteOrNull(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null;
}

/** Histories handed out and taken back: a log of many solves needs only those of the solves still of interest. */
export function createHistoryPool(limit: number) {
  const free: ResidualHistory[] = [];
  return {
    take: (): ResidualHistory => free.pop() ?? createResidualHistory(limit),
    giveBack(history: ResidualHistory): void {
      history.reset();
      if (free.length < 4) free.push(history);
    },
  };
}
export type HistoryPool = ReturnType<typeof createHistoryPool>;
