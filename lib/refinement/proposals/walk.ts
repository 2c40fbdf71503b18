import { lossOf, type SearchRecord } from "./search-record";

/** Fewest changed cases with both first choices compared for a candidate to be considered. */
export const leastChangedCases = 8;

/** Of the cases a candidate changes, at least this share must have runs of both first choices: rivals are run where the first choice failed. */
const leastKnownShare = 0.5;

/**
 * Nested candidates: each changes the first choice of the cases up to one of its `ends`. A threshold moved further and further is one walk;
 * a single change is a walk with one end. Positions run along the changed cases, in the order in which they change.
 */
export type Walk = {
  /** Contested cases, as indices into the search record. */
  cases: Int32Array;
  /** First choice after the change. */
  afters: Int8Array;
  /** ln(cost before / cost after), above 0 saved; 0 where not both were compared. */
  gains: Float64Array;
  known: Uint8Array;
  /** Where candidates end (counts of positions), and what each is called by its family. */
  ends: readonly { count: number; tag: number }[];
  /** By position: 1 / sqrt(sum of squared gains) where an eligible candidate ends after it, else 0. */
  scale: Float64Array;
};

/** A changed case on the way: `group` is what candidates end with, in walking order; null tags end no candidate. */
export type Step = { index: number; after: number; tag: number | null };

/** Build a walk from its steps, or null when no candidate of it has enough known cases. */
export function walkOf(record: SearchRecord, steps: readonly Step[]): Walk | null {
  const walk: Walk = {
    cases: Int32Array.from(steps, ({ index }) => index),
    afters: Int8Array.from(steps, ({ after }) => after),
    gains: new Float64Array(steps.length),
    known: new Uint8Array(steps.length),
    ends: steps.flatMap(({ tag }, position) => (tag === null ? [] : [{ count: position + 1, tag }])),
    scale: new Float64Array(steps.length),
  };
  const eligible: { count: number; tag: number }[] = [];
  let squares = 0;
  let known = 0;
  steps.forEach(({ index, after, tag }, position) => {
    const gain = lossOf(record, index, record.firsts[index] ?? -1) - lossOf(record, index, after);
    if (!Number.isNaN(gain)) {
      walk.gains[position] = gain;
      walk.known[position] = 1;
      squares += gain * gain;
      known += 1;
    }
    if (tag === null || known < leastChangedCases || known < leastKnownShare * (position + 1) || squares === 0) return;
    walk.scale[position] = 1 / Math.sqrt(squares);
    eligible.push({ count: position + 1, tag });
  });
  return eligible.length === 0 ? null : { ...walk, ends: eligible };
}

/** Largest sum of gains over its root of squares, over all candidates of a walk, with the cases' signs flipped as given; 0 at least. */
export function largestStatistic({ cases, gains, scale }: Walk, signs: Int8Array): number {
  let sum = 0;
  let largest = 0;
  for (let position = 0; position < cases.length; position += 1) {
    sum += (signs[cases[position] ?? 0] ?? 1) * (gains[position] ?? 0);
    const statistic = sum * (scale[position] ?? 0);
    if (statistic > largest) largest = statistic;
  }
  return largest;
}
