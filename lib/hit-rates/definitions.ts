/** The definitions behind every hit rate, word for word the same on screen and in the API. */
export const hitRateTerms = ["compared", "converged", "worked", "best", "regret", "gapClosed", "interval"] as const;
export type HitRateTerm = (typeof hitRateTerms)[number];

export const hitRateDefinitions: Record<HitRateTerm, { term: string; text: string }> = {
  compared: {
    term: "Compared runs",
    text:
      "Runs of one case on the machine and cores the case names, one for each strategy: the first not withdrawn after the latest advice that stood when it was recorded. " +
      "The advice judged is the latest whose first strategy was run after it. Total time = set-up + repeated solves x solve.",
  },
  converged: {
    term: "Converged",
    text:
      "The true relative residual is at most 10 times the tolerance asked for. A run that met only the residual it monitors is not a success. " +
      "A run with no true residual recorded counts, marked “residual not verified”.",
  },
  worked: { term: "Worked", text: "The run by the advice's first strategy converged within the case's memory and time limits." },
  best: {
    term: "Best",
    text:
      "Among contested cases, those where at least one other strategy was measured too: no other converged run beats the advised run's total time by more than 25 %. " +
      "Converged runs without times enter worked only.",
  },
  regret: {
    term: "Regret",
    text:
      "Total time of the advised run over the best measured, at least 1; geometric mean over contested cases. A failed run costs 10 times the case's time limit, or, " +
      "where none is given, 10 times the slowest converged run compared. Contested cases in which nothing converged are left out of best and regret, and counted.",
  },
  gapClosed: {
    term: "Gap closed",
    text:
      "1 - ln(regret of the advice) / ln(regret of the best single strategy in hindsight), on the cases where both were measured. 1 is perfect, 0 no better than always " +
      "taking that one strategy. Strategies measured in fewer than half of the contested cases are not candidates. Undefined where the single strategy's regret is below 1.05.",
  },
  interval: { term: "Interval", text: "Wilson's 95 % interval. Below 5 cases a rate is shown as a count only." },
};

/** Another converged run must be faster by more than this factor for the advice not to be best; repeats of one run differ by 1.1 to 1.5. */
export const bestMargin = 1.25;
/** The field's PAR10: a failed run costs this many times the limit. */
export const failurePenalty = 10;
/** Below this regret of the single best strategy there is no gap worth closing. */
export const leastSingleRegret = 1.05;
/** A single strategy is a candidate when it was measured in at least this share of the contested cases. */
export const leastSingleCoverage = 0.5;
/** Rates of fewer cases are shown as counts. */
export const leastCasesForRate = 5;
