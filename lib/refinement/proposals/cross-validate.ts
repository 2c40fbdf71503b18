import type { Candidate, Family } from "./family";
import { folds, type SearchRecord } from "./search-record";

/** The candidate of a family that saves most over the whole record, with its sum of gains and its statistic; null when none saves. */
export function bestCandidate(family: Family): { candidate: Candidate; gain: number; statistic: number } | null {
  let found: { candidate: Candidate; gain: number; statistic: number } | null = null;
  family.walks.forEach((walk, index) => {
    let gain = 0;
    let position = 0;
    for (const { count, tag } of walk.ends) {
      for (; position < count; position += 1) gain += walk.gains[position] ?? 0;
      if (gain > 0 && (found === null || gain > found.gain)) found = { candidate: { walk: index, count, tag }, gain, statistic: gain * (walk.scale[count - 1] ?? 0) };
    }
  });
  return found;
}

/** Held-out first choices of a family and what they save. */
export type CrossValidated = {
  /** First choice of each contested case by the candidate chosen without its fold. */
  afters: Int8Array;
  gain: number;
  /** Sum of held-out gains over the root of the sum of their squares; 0 for none. */
  statistic: number;
};

/** Choose the family's candidate on all folds but one, judge it on that one, for each fold. A fold without a saving candidate keeps the live choice. */
export function crossValidate(record: SearchRecord, family: Family): CrossValidated {
  const afters = Int8Array.from(record.firsts);
  let gain = 0;
  let squares = 0;
  for (let fold = 0; fold < folds; fold += 1) {
    const chosen = chooseWithout(record, family, fold);
    if (chosen === null) continue;
    const walk = family.walks[chosen.walk];
    for (let position = 0; position < chosen.count; position += 1) {
      const index = walk?.cases[position] ?? 0;
      if (record.fold[index] !== fold) continue;
      afters[index] = walk?.afters[position] ?? -1;
      const saved = walk?.gains[position] ?? 0;
      gain += saved;
      squares += saved * saved;
    }
  }
  return { afters, gain, statistic: squares === 0 ? 0 : gain / Math.sqrt(squares) };
}

function chooseWithout(record: SearchRecord, family: Family, fold: number): { walk: number; count: number } | null {
  let found: { walk: number; count: number } | null = null;
  let most = 0;
  family.walks.forEach((walk, index) => {
    let sum = 0;
    let position = 0;
    for (const { count } of walk.ends) {
      for (; position < count; position += 1) if (record.fold[walk.cases[position] ?? 0] !== fold) sum += walk.gains[position] ?? 0;
      if (sum > most) {
        most = sum;
        found = { walk: index, count };
      }
    }
  });
  return found;
}
