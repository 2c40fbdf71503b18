import type { Answers } from "@/lib/questionnaire/answers";
import { formatRatio } from "@/lib/shared/format";
import { scaleRange, type Range } from "@/lib/shared/range";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { Factor, RankingEntry } from "./advice";
import { listedPlace, type RuleEffects } from "./effects";
import type { EvidenceFactor } from "./evidence";
import type { Estimates } from "./facts";
import { resolveFallback } from "./fallbacks";
import { limitCautions, standingOf, type Standing, type StrategyTraits } from "./feasibility";
import { priorityFactor } from "./priority";

export type RankInput = {
  answers: Answers;
  traits: Readonly<Record<StrategyId, StrategyTraits>>;
  estimates: Estimates;
  effects: RuleEffects;
  evidence: Readonly<Record<StrategyId, EvidenceFactor>>;
};

type Candidate = { strategy: StrategyId; standing: Standing; factors: Factor[]; score: Range };

/** Below the line: first what more memory would cure, then what a rule decided, then what the program or the element can't do. */
const lineOrder: Record<RankingEntry["status"], number> = { ranked: 0, infeasible: 1, excluded: 2, unavailable: 3 };

/**
 * The ranking, every strategy once, ranks 1 to 11. Score = median total time x rules' factors x evidence factor x priority factor; ranked
 * strategies by score, ties in the listed order; then the others by reason and listed order.
 */
export function rankStrategies(input: RankInput): RankingEntry[] {
  const standings = strategyIds.map((strategy) => ({ strategy, standing: standingFor(input, strategy) }));
  const competing = standings.filter(({ standing }) => standing.status === "ranked");
  const leanestGiB = Math.min(...competing.map(({ strategy }) => input.estimates[strategy].memoryGiB.median));
  const candidates = standings.map(({ strategy, standing }) => candidateOf(input, strategy, standing, leanestGiB)).sort(compareCandidates);
  const ranked = candidates.filter(({ standing }) => standing.status === "ranked");
  const first = ranked[0]?.score.median ?? 1;
  return candidates.map((candidate, index) => entryOf(input, candidate, index + 1, first, ranked.map(({ strategy }) => strategy)));
}

function standingFor({ answers, traits, estimates, effects }: RankInput, strategy: StrategyId): Standing {
  return standingOf(answers, traits[strategy], estimates[strategy], effects.strategies[strategy].exclusions);
}

function candidateOf({ answers, estimates, effects, evidence }: RankInput, strategy: StrategyId, standing: Standing, leanestGiB: number): Candidate {
  const estimate = estimates[strategy];
  const weight = standing.status === "ranked" ? priorityFactor(answers.priority, estimate, leanestGiB) : null;
  const factors = [...effects.strategies[strategy].factors, evidenceEntry(evidence[strategy]), weight].filter((factor) => factor !== null);
  const product = factors.reduce((all, { factor }) => all * factor, 1);
  return { strategy, standing, factors, score: scaleRange(estimate.totalSeconds, product) };
}

function evidenceEntry({ factor, runs, spread }: EvidenceFactor): Factor | null {
  if (runs === 0) return null;
  const who = runs === 1 ? "1 recorded run speaks" : `${runs} recorded runs speak`;
  return {
    kind: "evidence",
    rule: null,
    factor,
    text: `${who}: here expect ${formatRatio(factor, 3)} the time of model and rules, 80 % of runs within a factor of ${formatRatio(spread, 3).replace(/x$/, "")}.`,
    source: null,
  };
}

function compareCandidates(a: Candidate, b: Candidate): number {
  const line = lineOrder[a.standing.status] - lineOrder[b.standing.status];
  if (line !== 0) return line;
  const score = a.standing.status === "ranked" ? a.score.median - b.score.median : 0;
  return score !== 0 ? score : listedPlace(a.strategy) - listedPlace(b.strategy);
}

function entryOf(input: RankInput, candidate: Candidate, rank: number, first: number, ranked: readonly StrategyId[]): RankingEntry {
  const { strategy, standing, factors, score } = candidate;
  const estimate = input.estimates[strategy];
  const { parameters, cautions, fallback } = input.effects.strategies[strategy];
  const isRanked = standing.status === "ranked";
  return {
    rank,
    strategy,
    status: standing.status,
    reason: standing.reason,
    relativeTime: isRanked ? relative(score.median, first) : null,
    relativeRange: isRanked ? { low: relative(score.low, first), high: relative(score.high, first) } : null,
    parameters: { ...estimate.parameters, ...parameters },
    estimate,
    factors,
    cautions: isRanked ? [...limitCautions(input.answers, estimate), ...cautions] : cautions,
    fallback: resolveFallback(strategy, fallback ?? input.traits[strategy].fallback, (id) => input.traits[id].fallback.strategy, ranked),
    evidenceRuns: input.evidence[strategy].runs,
  };
}

function relative(score: number, first: number): number {
  return first > 0 ? score / first : 1;
}
