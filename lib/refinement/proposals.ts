import type { RuleSet } from "@/rules/rule-schema";
import type { PreparedReplay } from "./prepare-replay";
import type { Proposal, ProposalResult } from "./proposal-schema";
import { correctForSearch } from "./proposals/correct-for-search";
import { bestCandidate, crossValidate, type CrossValidated } from "./proposals/cross-validate";
import type { Candidate, Family } from "./proposals/family";
import { makeProposal } from "./proposals/make-proposal";
import { orderProposals } from "./proposals/order-proposals";
import { regionFamilies } from "./proposals/region-families";
import { factorFamilies, switchOffFamilies } from "./proposals/revision-families";
import { searchRecord, type SearchRecord } from "./proposals/search-record";
import { thresholdFamilies } from "./proposals/threshold-families";
import { runAtOnce, runInSteps, scaled, type StepOptions, type Steps } from "./run-in-steps";

/** Fewer contested cases than this, and nothing is searched. */
export const leastContestedCases = 30;

/** Corrected probability up to which a candidate is proposed. */
export const proposalLevel = 0.01;

/** Held-out gains must reach this many of their own standard errors (one-sided 5 %). */
const leastHeldOutStatistic = 1.645;

export type SearchOptions = StepOptions & { seed: number };

/**
 * Refinements of the live rules that the record can defend. For every idea (a threshold, a factor, a rule off, a new one-comparison rule)
 * the candidate that saves most ln(cost) is kept if (1) it changes at least 8 cases with runs of both first choices, (2) chosen on four
 * fifths of the cases it saves on the held-out fifth, fold by fold, and (3) its studentised gain is beyond what the best of all candidates
 * would reach by chance, by sign flips. Changes of existing rules and new rules are searched as two groups, each at half the level.
 * Nothing is applied. The same record, rules and seed give the same result.
 */
export function searchProposals(prepared: PreparedReplay, ruleSet: RuleSet, { seed, ...options }: SearchOptions): Promise<ProposalResult> {
  return runInSteps(searchSteps(prepared, ruleSet, seed), options);
}

/** The same without pauses. */
export function searchProposalsAtOnce(prepared: PreparedReplay, ruleSet: RuleSet, seed: number): ProposalResult {
  return runAtOnce(searchSteps(prepared, ruleSet, seed));
}

export type Found = { family: Family; candidate: Candidate; statistic: number; heldOut: CrossValidated; pValue: number };

function* searchSteps(prepared: PreparedReplay, ruleSet: RuleSet, seed: number): Steps<ProposalResult> {
  const record = searchRecord(prepared, ruleSet, seed);
  yield 0.02;
  if (record.rows.length < leastContestedCases) return resultOf(record, 0, []);
  const thresholds = thresholdFamilies(record);
  yield 0.05;
  const switches = switchOffFamilies(record);
  yield 0.07;
  const revisions = [...thresholds, ...switches, ...factorFamilies(record)];
  yield 0.1;
  const additions = yield* scaled(regionFamilies(record), 0.1, 0.2);
  const revised = yield* scaled(testFamilies(record, revisions, seed + 1), 0.3, 0.2);
  const added = yield* scaled(testFamilies(record, additions, seed + 2), 0.5, 0.5);
  const proposals = orderProposals([...revised, ...added]).map((item) => makeProposal(record, item));
  return resultOf(record, countCandidates(revisions) + countCandidates(additions), proposals);
}

const familiesPerStep = 50;

function* testFamilies(record: SearchRecord, families: readonly Family[], seed: number): Steps<Found[]> {
  const promising: Omit<Found, "pValue">[] = [];
  for (const [at, family] of families.entries()) {
    const best = bestCandidate(family);
    const heldOut = best === null || best.statistic < leastHeldOutStatistic ? null : crossValidate(record, family);
    if (best !== null && heldOut !== null && heldOut.statistic >= leastHeldOutStatistic) promising.push({ family, ...best, heldOut });
    if (at % familiesPerStep === 0) yield (0.2 * at) / families.length;
  }
  if (promising.length === 0) return [];
  const pValues = yield* scaled(correctForSearch(families, promising, { cases: record.rows.length, seed, level: proposalLevel / 2 }), 0.2, 0.8);
  return promising.flatMap((item, index): Found[] => {
    const pValue = Math.min(1, 2 * (pValues[index] ?? 1));
    return pValue <= proposalLevel ? [{ ...item, pValue }] : [];
  });
}

function countCandidates(families: readonly Family[]): number {
  return families.reduce((count, { walks }) => walks.reduce((sum, { ends }) => sum + ends.length, count), 0);
}

function resultOf({ prepared, rows }: SearchRecord, candidates: number, proposals: Proposal[]): ProposalResult {
  const enough = rows.length >= leastContestedCases;
  return {
    cases: prepared.cases.length,
    contestedCases: rows.length,
    leastContestedCases,
    enough,
    candidates,
    level: proposalLevel,
    text: enough ? searched(rows.length, candidates, proposals.length) : tooFew(rows.length),
    proposals,
  };
}

function tooFew(contested: number): string {
  const have = contested === 1 ? "1 case" : `${contested} cases`;
  return `Too few runs: ${have} where the first choice was compared with another strategy, ${leastContestedCases} are needed. Run a second strategy on more cases.`;
}

function searched(contested: number, candidates: number, count: number): string {
  const kept = count === 0 ? "None" : String(count);
  return `${candidates} candidate changes tried on ${contested} contested cases. ${kept} can be defended: better on held-out cases, and beyond what such a search finds by chance in 99 of 100 records.`;
}
