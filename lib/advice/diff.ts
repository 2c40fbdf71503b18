import { formatRatio, formatSeconds } from "@/lib/shared/format";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Advice, RankingEntry } from "./advice";

export const changeKinds = ["edition", "model", "evidence", "first", "place", "status", "time", "factor"] as const;
export type ChangeKind = (typeof changeKinds)[number];

/** One difference between two advices of a case, in a plain sentence. `strategy` is null for what concerns the whole. */
export type AdviceChange = { kind: ChangeKind; strategy: StrategyId | null; text: string };

/** Predictions that differ by less than this factor are called the same. */
const sameTimeFactor = 1.005;

/**
 * What changed from one advice to the next: first what it was computed from, then the first choice, then strategy by strategy in the new
 * order. Empty when nothing did. `nameOf` gives a strategy's name, its id by default.
 */
export function diffAdvice(before: Advice, after: Advice, nameOf: (strategy: StrategyId) => string = (id) => id): AdviceChange[] {
  return [
    ...sourceChanges(before, after),
    ...firstChange(before, after, nameOf),
    ...after.ranking.flatMap((entry) => {
      const former = before.ranking.find(({ strategy }) => strategy === entry.strategy);
      return former ? entryChanges(former, entry, nameOf(entry.strategy)) : [];
    }),
  ];
}

function sourceChanges(before: Advice, after: Advice): AdviceChange[] {
  const whole = (kind: ChangeKind, text: string): AdviceChange => ({ kind, strategy: null, text });
  const changes: AdviceChange[] = [];
  if (before.edition.number !== after.edition.number) {
    changes.push(whole("edition", `Edition ${after.edition.number} instead of ${before.edition.number}.`));
  }
  if (before.modelVersion !== after.modelVersion) changes.push(whole("model", `Model ${after.modelVersion} instead of ${before.modelVersion}.`));
  if (before.evidence.runs !== after.evidence.runs) {
    changes.push(whole("evidence", `${after.evidence.runs} recorded runs speak instead of ${before.evidence.runs}.`));
  }
  return changes;
}

function firstChange(before: Advice, after: Advice, nameOf: (strategy: StrategyId) => string): AdviceChange[] {
  const [was, is] = [firstOf(before), firstOf(after)];
  if (was === is) return [];
  const name = (strategy: StrategyId | null) => (strategy === null ? "none" : nameOf(strategy));
  return [{ kind: "first", strategy: is, text: `First choice: ${name(is)} instead of ${name(was)}.` }];
}

function firstOf({ ranking }: Advice): StrategyId | null {
  return ranking.find(({ status }) => status === "ranked")?.strategy ?? null;
}

function entryChanges(former: RankingEntry, entry: RankingEntry, name: string): AdviceChange[] {
  const change = (kind: ChangeKind, text: string): AdviceChange => ({ kind, strategy: entry.strategy, text });
  const changes: AdviceChange[] = [];
  if (former.status !== entry.status) {
    const why = entry.reason === null ? "" : ` ${entry.reason}`;
    changes.push(change("status", `${name}: ${entry.status} instead of ${former.status}.${why}`));
  } else if (entry.status === "ranked" && former.rank !== entry.rank) {
    changes.push(change("place", `${name}: place ${entry.rank} instead of ${former.rank}.`));
  }
  const [was, is] = [former.estimate.totalSeconds.median, entry.estimate.totalSeconds.median];
  if (!isSame(was, is)) changes.push(change("time", `${name}: the model predicts ${formatSeconds(is)} instead of ${formatSeconds(was)}.`));
  return [...changes, ...factorChanges(former, entry, name)];
}

function isSame(was: number, is: number): boolean {
  return is <= was * sameTimeFactor && was <= is * sameTimeFactor;
}

/** Factors are known by their rule, or by their kind where no rule made them; a rule may act on a strategy more than once. */
function factorChanges(former: RankingEntry, entry: RankingEntry, name: string): AdviceChange[] {
  const [was, is] = [productsByOrigin(former), productsByOrigin(entry)];
  return [...new Set([...is.keys(), ...was.keys()])].flatMap((origin): AdviceChange[] => {
    const [old, now] = [was.get(origin), is.get(origin)];
    if (old !== undefined && now !== undefined && isSame(old, now)) return [];
    const text =
      now === undefined
        ? `${name}: ${origin} no longer acts (was ${formatRatio(old)}).`
        : old === undefined
          ? `${name}: ${origin} acts now (${formatRatio(now)}).`
          : `${name}: ${origin} ${formatRatio(now, 3)} instead of ${formatRatio(old, 3)}.`;
    return [{ kind: "factor", strategy: entry.strategy, text }];
  });
}

function productsByOrigin({ factors }: RankingEntry): Map<string, number> {
  const products = new Map<string, number>();
  for (const { kind, rule, factor } of factors) {
    const origin = rule === null ? kind : `rule ${rule}`;
    products.set(origin, (products.get(origin) ?? 1) * factor);
  }
  return products;
}
