import { z } from "zod";
import { geometricMean } from "@/lib/numerics/statistics/geometric-mean";
import { wilsonInterval } from "@/lib/numerics/statistics/wilson";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { leastSingleCoverage, leastSingleRegret } from "./definitions";
import { ratioFromOne, type Judgement } from "./record";

/** x of n with Wilson's 95 % interval; [0, 1] for no cases. */
export const rateSchema = z.object({ x: z.int(), n: z.int(), low: z.number(), high: z.number() });
export type Rate = z.infer<typeof rateSchema>;

export const ratesSchema = z.object({
  worked: rateSchema,
  best: rateSchema,
  /** Geometric mean, at least 1; null for no contested cases. */
  regret: z.object({ value: z.number().nullable(), n: z.int() }),
  /** Null where undefined; `singleStrategy` is the best single one in hindsight. */
  gapClosed: z.object({ value: z.number().nullable(), n: z.int(), singleStrategy: z.string().nullable(), singleRegret: z.number().nullable() }),
  /** Contested cases in which nothing converged, left out of best and regret. */
  leftOut: z.int(),
});
export type Rates = z.infer<typeof ratesSchema>;

/** All figures of a set of judged cases. */
export function ratesOf(judgements: readonly Judgement[]): Rates {
  const contests = judgements.flatMap((judgement) => judgement.contest ?? []);
  return {
    worked: rateOf(judgements.filter((judgement) => judgement.worked).length, judgements.length),
    best: rateOf(contests.filter((contest) => contest.best).length, contests.length),
    regret: { value: geometricMean(contests.map((contest) => contest.regret)), n: contests.length },
    gapClosed: gapClosedOf(contests),
    leftOut: judgements.filter((judgement) => judgement.leftOut).length,
  };
}

export function rateOf(x: number, n: number): Rate {
  return { x, n, ...wilsonInterval(x, n) };
}

type Contest = NonNullable<Judgement["contest"]>;
type Single = { strategy: string; regret: number; adviceRegret: number; n: number };

/**
 * 1 - ln(R_advice) / ln(R_single) on the cases where the advised and the single strategy were both measured: ASlib's measure on a
 * log scale (Bischl et al., Artificial Intelligence 237, 2016). The single strategy is the candidate of least regret; equal
 * regrets go to the one measured more often, then to the order in which strategies are listed.
 */
function gapClosedOf(contests: readonly Contest[]): Rates["gapClosed"] {
  const single = bestSingle(contests);
  if (single === null) return { value: null, n: 0, singleStrategy: null, singleRegret: null };
  const { strategy, regret, adviceRegret, n } = single;
  const value = regret < leastSingleRegret ? null : 1 - Math.log(adviceRegret) / Math.log(regret);
  return { value, n, singleStrategy: strategy, singleRegret: regret };
}

function bestSingle(contests: readonly Contest[]): Single | null {
  const singles = strategyIds.flatMap((strategy) => singleOf(strategy, contests) ?? []);
  if (singles.length === 0) return null;
  const mostMeasured = Math.max(...singles.map((single) => single.n));
  const enough = Math.min(mostMeasured, leastSingleCoverage * contests.length);
  const candidates = singles.filter((single) => single.n >= enough);
  return candidates.reduce((best, single) => (single.regret < best.regret || (single.regret === best.regret && single.n > best.n) ? single : best));
}

function singleOf(strategy: string, contests: readonly Contest[]): Single | null {
  const both = contests.filter((contest) => contest.costs.has(strategy));
  const regret = geometricMean(both.flatMap((contest) => costRatio(contest, strategy) ?? []));
  const adviceRegret = geometricMean(both.map((contest) => contest.regret));
  return regret === null || adviceRegret === null ? null : { strategy, regret, adviceRegret, n: both.length };
}

function costRatio(contest: Contest, strategy: string): number | null {
  const cost = contest.costs.get(strategy);
  return cost === undefined ? null : ratioFromOne(cost, contest.fastestSeconds);
}
