import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { editionFile } from "@/rules/edition-json-schema";
import { strategyIds } from "@/lib/shared/strategy-ids";
import type { RuleSet } from "@/rules/rule-schema";

/** An invented record in which one threshold of the rules is wrong: runs and rules for tests of the way from record to edition. */
const plantedRules: RuleSet = [
  {
    id: "two-strategies-only",
    title: "Only the two strategies that were run may compete",
    enabled: true,
    when: { fact: "degree", operator: "greaterThanInclusive", value: 1 },
    then: strategyIds.filter((strategy) => strategy !== "direct-ldlt" && strategy !== "schur-diag-direct").map((strategy) => ({ kind: "exclude", strategy, reason: "Invented for a test." })),
    rationale: "Invented for a test.",
    source: { kind: "common-practice" },
  },
  {
    id: "direct-otherwise",
    title: "Direct solver otherwise",
    enabled: true,
    when: { fact: "degree", operator: "greaterThanInclusive", value: 1 },
    then: [{ kind: "favour", strategy: "direct-ldlt", factor: 100 }],
    rationale: "Invented for a test.",
    source: { kind: "common-practice" },
  },
  {
    id: "blocks-when-large",
    title: "Block preconditioner for large systems",
    enabled: true,
    when: { fact: "unknowns", operator: "greaterThan", value: 30_000 },
    then: [{ kind: "favour", strategy: "schur-diag-direct", factor: 100 }, { kind: "disfavour", strategy: "direct-ldlt", factor: 100 }],
    rationale: "Invented for a test: the threshold stands too low.",
    source: { kind: "common-practice" },
  },
];

export const plantedEdition = editionFile(plantedRules, "");

/** Where the runs say that the block preconditioner begins to win. */
export const trueThreshold = 100_000;

const count = 48;

/** 48 sizes from 10 000 to 400 000 unknowns, evenly spread on a log scale, with the seconds of both strategies. */
export const plantedCases = Array.from({ length: count }, (_, index) => {
  const unknowns = Math.round(10_000 * 40 ** (index / (count - 1)));
  const blocksWin = unknowns > trueThreshold;
  return {
    questionnaire: { ...defaultQuestionnaire, title: `Planted ${index + 1}`, size: { by: "unknowns" as const, value: unknowns } },
    runs: [plantedRun("direct-ldlt", blocksWin ? 36 : 6), plantedRun("schur-diag-direct", blocksWin ? 12 : 18)],
  };
});

function plantedRun(strategy: "direct-ldlt" | "schur-diag-direct", totalSeconds: number) {
  return { strategy, outcome: "converged" as const, setupSeconds: 1, solveSeconds: totalSeconds - 1, trueRelativeResidual: 1e-8 };
}
