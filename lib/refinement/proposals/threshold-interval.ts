import { normalQuantile } from "@/lib/numerics/statistics/normal";
import type { ThresholdInterval } from "../proposal-schema";

type Placed = { value: number; gainAbove: number | null };

export const intervalConfidence = 0.9;

/**
 * Thresholds that the recorded cases can't tell from the chosen one, by inverting a test: a threshold t stays in the interval unless the
 * cases between it and the chosen one cost significantly more under t. With m such cases and a gain's spread s from case to case, t goes
 * when the sum of their gains exceeds z s sqrt(m). s is Rice's estimate from neighbouring cases, sum (g[i+1] - g[i])^2 / (2 (n - 1)), which
 * a trend or a jump hardly touches (Rice, Ann. Statist. 12, 1984). z leaves half of 1 - confidence to each side. The ends are the recorded values next
 * to the last threshold kept. `chosen` are the values next to the chosen threshold, `ends` the record's smallest and largest value.
 */
export function thresholdInterval(placed: readonly Placed[], chosen: { below: number; above: number }, ends: readonly [number, number]): ThresholdInterval {
  const known = placed.flatMap(({ value, gainAbove }) => (gainAbove === null ? [] : [{ value, gain: gainAbove }]));
  const limit = normalQuantile(0.5 + intervalConfidence / 2) * spreadOf(known.map(({ gain }) => gain));
  // Raising the threshold past a case puts the case below it and loses its gain above; lowering wins it.
  const higher = reach(known.filter(({ value }) => value >= chosen.above).map(({ value, gain }) => ({ value, cost: gain })), limit);
  const lower = reach(known.filter(({ value }) => value <= chosen.below).reverse().map(({ value, gain }) => ({ value, cost: -gain })), limit);
  return {
    low: lower ?? Math.min(ends[0], chosen.below),
    high: higher ?? Math.max(ends[1], chosen.above),
    openLow: lower === null,
    openHigh: higher === null,
    confidence: intervalConfidence,
  };
}

/** The case before which the furthest threshold kept lies; null where the record ends first. `cases` nearest first; equal values move together. */
function reach(cases: readonly { value: number; cost: number }[], limit: number): number | null {
  let sum = 0;
  let end = cases[0]?.value ?? null;
  cases.forEach(({ value, cost }, position) => {
    sum += cost;
    const next = cases[position + 1]?.value;
    if (next === value) return;
    if (sum <= limit * Math.sqrt(position + 1)) end = next ?? null;
  });
  return end;
}

/** Rice's spread of a sequence about its trend; for fewer than three values their largest size. */
function spreadOf(values: readonly number[]): number {
  if (values.length < 3) return Math.max(0, ...values.map(Math.abs));
  let squares = 0;
  for (let position = 1; position < values.length; position += 1) squares += ((values[position] ?? 0) - (values[position - 1] ?? 0)) ** 2;
  return Math.sqrt(squares / (2 * (values.length - 1)));
}
