export type LogTick = { value: number; /** 1 at powers of ten, else 2 or 5. */ step: 1 | 2 | 5 };

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
 * A base-10 log axis that holds all positive, finite values given, its ends on 1, 2 or 5 times a power of ten. Values that are
 * not positive have no place on it and stand at its lower end. Without any value the axis runs from 1 to 10.
 */
export function makeLogScale(values: readonly number[]): LogScale {
  const usable = values.filter((value) => value > 0 && Number.isFinite(value));
  const low = usable.length === 0 ? 1 : Math.min(...usable);
  const high = usable.length === 0 ? 10 : Math.max(...usable);
  const min = stepBelow(low);
  const max = stepAbove(Math.max(high, min * 2));
  const decades = Math.log10(max) - Math.log10(min);
  const position = (value: number): number => {
    if (!(value > min)) return 0;
    return value >= max ? 100 : ((Math.log10(value) - Math.log10(min)) / decades) * 100;
  };
  return { min, max, position, ticks: ticksBetween(min, max), decades };
}

const steps = [1, 2, 5] as const;

function ticksBetween(min: number, max: number): LogTick[] {
  const ticks: LogTick[] = [];
  for (let exponent = Math.floor(Math.log10(min)) - 1; exponent <= Math.ceil(Math.log10(max)); exponent += 1) {
    for (const step of steps) {
      const value = tickValue(step, exponent);
      if (value >= min * (1 - 1e-9) && value <= max * (1 + 1e-9)) ticks.push({ value, step });
    }
  }
  return ticks;
}

function stepBelow(value: number): number {
  const exponent = Math.floor(Math.log10(value) + 1e-12);
  const found = [5, 2, 1].find((step) => tickValue(step, exponent) <= value * (1 + 1e-9));
  return tickValue(found ?? 1, exponent);
}

function stepAbove(value: number): number {
  const exponent = Math.floor(Math.log10(value) + 1e-12);
  const found = [1, 2, 5, 10].find((step) => tickValue(step, exponent) >= value * (1 - 1e-9));
  return tickValue(found ?? 10, exponent);
}

/** Through the decimal text, so that 2 x 10⁻³ is 0.002 and not 0.0020000000000000005. */
function tickValue(step: number, exponent: number): number {
  return Number(`${step}e${exponent}`);
}

/** Which ticks to label on a wide axis and which of them also on a narrow one, so that labels never run into each other. */
export function labelledTicks(scale: LogScale): { tick: LogTick; narrow: boolean }[] {
  const every = Math.max(1, Math.ceil(scale.decades / 8));
  const narrowEvery = Math.max(1, Math.ceil(scale.decades / 4));
  return scale.ticks
    .filter((tick) => (tick.step === 1 ? exponentOf(tick) % every === 0 : scale.decades <= 2.4))
    .map((tick) => ({ tick, narrow: tick.step === 1 ? exponentOf(tick) % narrowEvery === 0 : scale.decades <= 1.1 }));
}

function exponentOf(tick: LogTick): number {
  return Math.abs(Math.round(Math.log10(tick.value)));
}
