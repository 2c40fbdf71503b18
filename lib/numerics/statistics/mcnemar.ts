import { exactBinomialHalf } from "./exact-binomial";

export type McNemarResult = {
  /** Pairs in which only the first, only the second succeeded. */
  onlyFirst: number;
  onlySecond: number;
  /** Exact two-sided p value: the binomial test on the discordant pairs. */
  pValue: number;
  /** (onlyFirst - onlySecond)^2 / (onlyFirst + onlySecond), without continuity correction; null without discordant pairs. */
  chiSquare: number | null;
};

/** McNemar's test of two yes/no answers on the same cases (McNemar, Psychometrika 12, 1947; exact form in Agresti, Categorical Data Analysis). */
export function mcnemarTest(onlyFirst: number, onlySecond: number): McNemarResult {
  const discordant = onlyFirst + onlySecond;
  return {
    onlyFirst,
    onlySecond,
    pValue: exactBinomialHalf(onlyFirst, onlySecond),
    chiSquare: discordant === 0 ? null : (onlyFirst - onlySecond) ** 2 / discordant,
  };
}
