import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import { numberFact, type FactDefinition } from "../fact";

/** First part of a strategy's facts: `directLdlt` in `directLdltMemoryGiB`. */
export const factPrefixes: Record<StrategyId, string> = {
  "direct-ldlt": "directLdlt",
  "direct-blr": "directBlr",
  "schur-diag-direct": "schurDiagDirect",
  "schur-diag-amg": "schurDiagAmg",
  "schur-triangular": "schurTriangular",
  "regularized-amg": "regularizedAmg",
  "hdiv-auxiliary": "hdivAuxiliary",
  "hybridized-amg": "hybridizedAmg",
  bddc: "bddc",
  "schwarz-two-level": "schwarzTwoLevel",
  "p-multigrid": "pMultigrid",
};

/** Last part of a strategy's facts. */
export const strategyFactSuffixNames = [
  "Iterations",
  "MemoryGiB",
  "MemoryShare",
  "HighMemoryShare",
  "SetupSeconds",
  "SolveSeconds",
  "TotalSeconds",
  "SetupShare",
  "TimeLimitShare",
  "EvidenceRuns",
] as const;
export type StrategyFactSuffix = (typeof strategyFactSuffixNames)[number];

type Suffix = {
  suffix: StrategyFactSuffix;
  label: string;
  plural: boolean;
  unit: string;
  group: "estimates" | "evidence";
  whole: boolean;
  description: string;
};

const estimate = (suffix: StrategyFactSuffix, label: string, unit: string, description: string, plural = false): Suffix => ({
  suffix,
  label,
  plural,
  unit,
  group: "estimates",
  whole: false,
  description,
});

/** What is known of every strategy: medians of its estimate, and the runs recorded of it. */
const strategyFactSuffixes: readonly Suffix[] = [
  estimate("Iterations", "predicted iterations", "", "Median of the predicted iterations; 1 for a factorisation.", true),
  estimate("MemoryGiB", "predicted memory", "GiB", "Median of the predicted peak memory over all processes."),
  estimate("MemoryShare", "share of the machine's memory", "", "Median memory over the memory of all nodes."),
  estimate("HighMemoryShare", "share of the machine's memory at the high end", "", "High end of the memory range over the memory of all nodes."),
  estimate("SetupSeconds", "predicted set-up time", "s", "Median of the predicted set-up time."),
  estimate("SolveSeconds", "predicted solve time", "s", "Median of the predicted time of one solve."),
  estimate("TotalSeconds", "predicted total time", "s", "Median of set-up plus all solves."),
  estimate("SetupShare", "share of set-up in the total time", "", "Median set-up time over median total time."),
  estimate("TimeLimitShare", "share of the time limit", "", "Median total time over the time limit; near 0 where none is given."),
  {
    suffix: "EvidenceRuns",
    label: "recorded runs",
    plural: true,
    unit: "",
    group: "evidence",
    whole: true,
    description: "Runs of this strategy in the team's record that speak in its evidence factor.",
  },
];

/** Name of one strategy's fact, such as `schurDiagDirectIterations`. */
export function strategyFactName(strategy: StrategyId, suffix: StrategyFactSuffix): string {
  return factPrefixes[strategy] + suffix;
}

/** Facts of every strategy, in the strategies' order. */
export const strategyFacts: readonly FactDefinition[] = strategyIds.flatMap((strategy) =>
  strategyFactSuffixes.map(({ suffix, label, plural, unit, group, whole, description }) =>
    numberFact({
      name: strategyFactName(strategy, suffix),
      label: `${strategy}'s ${label}`,
      plural,
      unit,
      group,
      whole,
      range: [0, 1e300],
      description,
    }),
  ),
);
