import type { QuantityUnit } from "@/lib/shared/format";

export type LogTick = { value: number; /** 1 for the heavy ticks, else 2 or 5. */ step: 1 | 2 | 5 };

export type LogScale = {
  min: number;
  max: number;
  /** Percent of the axis, 0 at min and 100 at max; values outside are held at the ends. */
  position: (value: number) => number;
  ticks: readonly LogTick[];
  /** Decades between min and max. */
  decades: number;
};

/**
 * A base-10 log axis that holds all positive, finite values given, its ends on ticks. Ticks are 1, 2 and 5 times powers of ten;
 * for seconds and GiB they are so within each unit a reader sees (10 s, 20 s, 1 min, 2 min), so that every label is exact.
 * Values that are not positive have no place on it and stand at its lower end. Without any value the axis runs from 1 to 10.
 */
export function makeLogScale(values: readonly number[], unit: QuantityUnit = "number"): LogScale {
  const usable = values.filter((value) => value > 0 && Number.isFinite(value));
  const low = usable.length === 0 ? 1 : Math.min(...usable);
  const high = usable.length === 0 ? 10 : Math.max(...usable, low * 2);
  const candidates = ticksAround(low, high, unit);
  const min = candidates.findLast((tick) => tick.value <= low * (1 + 1e-9))?.value ?? low;
  const max = candidates.find((tick) => tick.value >= high * (1 - 1e-9))?.value ?? high;
  const decades = Math.log10(max) - Math.log10(min);
  const position = (value: number): number => {
    if (!(value > min)) return 0;
    return value >= max ? 100 : ((Math.log10(value) - Math.log10(min)) / decades) * 100;
  };
  return { min, max, position, ticks: candidates.filter((tick) => tick.value >= min && tick.value <= max), decades };
}

/** Multiples within a unit of which there are 60, 24 or 1024 to the next; a heavy tick at 1 and at each power of ten. */
type UnitTicks = { size: number; multiples: readonly number[] };

const sixty = [1, 2, 5, 10, 20] as const;
const thousand = [1, 2, 5, 10, 20, 50, 100, 200, 500] as const;

const mixedUnits: Partial<Record<QuantityUnit, { units: readonly UnitTicks[]; last: number }>> = {
  seconds: {
    units: [
      { size: 1, multiples: sixty },
      { size: 60, multiples: sixty },
      { size: 3600, multiples: [1, 2, 5, 10] },
    ],
    last: 86_400,
  },
  gibibytes: {
    units: [
      { size: 2 ** -20, multiples: thousand },
      { size: 2 ** -10, multiples: thousand },
      { size: 1, multiples: thousand },
    ],
    last: 2 ** 10,
  },
};

/** Ascending ticks from at least one below `low` to at least one above `high`. */
function ticksAround(low: number, high: number, unit: QuantityUnit): LogTick[] {
  const mixed = mixedUnits[unit];
  if (mixed === undefined) return decimalTicks(low, high, 1);
  const first = mixed.units[0]?.size ?? 1;
  const below = low < first ? decimalTicks(low, first, first).filter((tick) => tick.value < first * (1 - 1e-9)) : [];
  const within = mixed.units.flatMap((each) => each.multiples.map((multiple): LogTick => ({ value: multiple * each.size, step: stepOf(multiple) })));
  const above = decimalTicks(mixed.last, Math.max(high, mixed.last), mixed.last).filter((tick) => tick.value >= mixed.last * (1 - 1e-9));
  return [...below, ...within, ...above];
}

function decimalTicks(low: number, high: number, size: number): LogTick[] {
  const from = Math.floor(Math.log10(low / size)) - 1;
  const to = Math.ceil(Math.log10(high / size)) + 1;
  const ticks: LogTick[] = [];
  for (let exponent = from; exponent <= to; exponent += 1) {
    // Through the decimal text, so that 2 x 10⁻³ is 0.002 and not 0.0020000000000000005.
    for (const step of [1, 2, 5] as const) ticks.push({ value: Number(`${step}e${exponent}`) * size, step });
  }
  return ticks;
}

function stepOf(multiple: number): 1 | 2 | 5 {
  const leading = String(multiple).charAt(0);
  if (leading === "1") return 1;
  return leading === "2" ? 2 : 5;
}

/** Which ticks to label on a wide axis and which of them also on a narrow one, so that labels never run into each other. */
export function labelledTicks(scale: LogScale): { tick: LogTick; narrow: boolean }[] {
  const heavy = scale.ticks.filter((tick) => tick.step === 1);
  const every = Math.max(1, Math.ceil(heavy.length / 9));
  const narrowEvery = every * Math.max(1, Math.ceil(heavy.length / every / 5));
  return scale.ticks.flatMap((tick) => {
    if (tick.step !== 1) return scale.decades <= 2.4 ? [{ tick, narrow: scale.decades <= 1.1 }] : [];
    const index = heavy.indexOf(tick);
    return index % every === 0 ? [{ tick, narrow: index % narrowEvery === 0 }] : [];
  });
}
