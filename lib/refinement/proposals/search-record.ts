import { seededRandom } from "@/lib/shared/random";
import type { RuleSet } from "@/rules/rule-schema";
import { chooseFirsts, noChoice, type RuleForce } from "../first-choices";
import { places, type PreparedReplay } from "../prepare-replay";
import { replayRuleSet, type Replay } from "../replay";

export const folds = 5;

/** The part of a record that a search can learn from: cases whose first choice under the live rules was compared with another strategy. */
export type SearchRecord = {
  prepared: PreparedReplay;
  live: Replay;
  /** Rows of `prepared`, one for each contested case; everything below counts along these. */
  rows: readonly number[];
  /** First choice under the live rules, by place. */
  firsts: Int8Array;
  /** ln(regret) of each place on each contested case, NaN where it was not compared; `places` entries a case. */
  losses: Float64Array;
  /** 1 where that place would have been best. */
  best: Uint8Array;
  /** Fold of each contested case, 0 to `folds` - 1, of equal sizes. */
  fold: Uint8Array;
};

export function searchRecord(prepared: PreparedReplay, ruleSet: RuleSet, seed: number): SearchRecord {
  const live = replayRuleSet(prepared, ruleSet);
  const rows = prepared.cases.flatMap((_, row) => (prepared.judgementOf(row, live.firsts[row] ?? noChoice)?.contest ? [row] : []));
  const losses = new Float64Array(rows.length * places).fill(Number.NaN);
  const best = new Uint8Array(rows.length * places);
  rows.forEach((row, index) => {
    for (let place = 0; place < places; place += 1) {
      const contest = prepared.judgementOf(row, place)?.contest ?? null;
      if (contest === null) continue;
      losses[index * places + place] = Math.log(contest.regret);
      best[index * places + place] = contest.best ? 1 : 0;
    }
  });
  const firsts = Int8Array.from(rows, (row) => live.firsts[row] ?? noChoice);
  return { prepared, live, rows, firsts, losses, best, fold: foldsOf(rows.length, seededRandom(seed)) };
}

function foldsOf(count: number, random: () => number): Uint8Array {
  const fold = Uint8Array.from({ length: count }, (_, index) => index % folds);
  for (let last = count - 1; last > 0; last -= 1) {
    const other = Math.floor(random() * (last + 1));
    const kept = fold[last] ?? 0;
    fold[last] = fold[other] ?? 0;
    fold[other] = kept;
  }
  return fold;
}

export function lossOf({ losses }: SearchRecord, index: number, place: number): number {
  return place < 0 ? Number.NaN : (losses[index * places + place] ?? Number.NaN);
}

/** First choices of the contested cases with one rule's effects and truth replaced, or with one more rule (`at` null). */
export function firstsWith({ prepared, live, rows }: SearchRecord, at: number | null, force: RuleForce, truths: Uint8Array): Int8Array {
  const index = at ?? live.forces.length;
  const firsts = new Int8Array(prepared.cases.length).fill(noChoice);
  chooseFirsts(prepared, live.forces.toSpliced(index, 1, force), live.truths.toSpliced(index, 1, truths), firsts);
  return Int8Array.from(rows, (row) => firsts[row] ?? noChoice);
}
