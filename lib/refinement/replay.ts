import { ratesOf } from "@/lib/hit-rates/rates";
import type { Judgement } from "@/lib/hit-rates/record";
import type { RuleSet } from "@/rules/rule-schema";
import { changesBetween } from "./changed-cases";
import { chooseFirsts, forceOf, noChoice, type RuleForce } from "./first-choices";
import { pairedTest } from "./paired-test";
import type { PreparedReplay } from "./prepare-replay";
import type { ChangedCase, ReplayResult } from "./replay-result";
import { runAtOnce, runInSteps, scaled, type StepOptions, type Steps } from "./run-in-steps";

/** A rule set's first choices on a record set, row by row, with what made them. */
export type Replay = {
  ruleSet: RuleSet;
  forces: readonly RuleForce[];
  /** Kleene truth by rule and row. */
  truths: readonly Uint8Array[];
  /** Places in `strategyIds`; -1 where nobody may compete. */
  firsts: Int8Array;
};

/** First choices of every recorded case under a rule set. A rule whose condition is unknown on a case does not act there. */
export function replayRuleSet(prepared: PreparedReplay, ruleSet: RuleSet): Replay {
  return runAtOnce(replaySteps(prepared, ruleSet));
}

/** The live edition against a draft on the same recorded cases, by the definitions of the hit rates. Old advice is not touched. */
export function compareReplays(prepared: PreparedReplay, live: RuleSet, draft: RuleSet): ReplayResult {
  return runAtOnce(compareSteps(prepared, live, draft));
}

/** The same in steps of a few milliseconds, with progress; rejects with the signal's reason when it is aborted. */
export function replayInSteps(prepared: PreparedReplay, live: RuleSet, draft: RuleSet, options: StepOptions = {}): Promise<ReplayResult> {
  return runInSteps(compareSteps(prepared, live, draft), options);
}

const rowsPerStep = 500;

export function* replaySteps(prepared: PreparedReplay, ruleSet: RuleSet): Steps<Replay> {
  const truths: Uint8Array[] = [];
  for (const { enabled, when } of ruleSet) {
    truths.push(enabled ? prepared.truthsOf(when) : new Uint8Array(prepared.cases.length));
    yield (0.5 * truths.length) / ruleSet.length;
  }
  const forces = ruleSet.map(forceOf);
  const firsts = new Int8Array(prepared.cases.length).fill(noChoice);
  for (const rows of rowSteps(prepared)) {
    chooseFirsts(prepared, forces, truths, firsts, rows);
    yield 0.5 + (0.5 * rows[1]) / prepared.cases.length;
  }
  return { ruleSet, forces, truths, firsts };
}

function* compareSteps(prepared: PreparedReplay, live: RuleSet, draft: RuleSet): Steps<ReplayResult> {
  const before = yield* scaled(replaySteps(prepared, live), 0, 0.3);
  const after = yield* scaled(replaySteps(prepared, draft), 0.3, 0.3);
  const pairs: Pair[] = [];
  const changes: ChangedCase[] = [];
  for (const rows of rowSteps(prepared)) {
    for (let row = rows[0]; row < rows[1]; row += 1) pairs.push(pairOf(prepared, row, before, after));
    changes.push(...changesBetween(prepared, before, after, rows));
    yield 0.6 + (0.4 * rows[1]) / prepared.cases.length;
  }
  return resultOf(pairs, changes);
}

function* rowSteps({ cases }: PreparedReplay): Generator<[number, number], void, void> {
  for (let from = 0; from < cases.length; from += rowsPerStep) yield [from, Math.min(cases.length, from + rowsPerStep)];
}

type Pair = { before: Judgement | null; after: Judgement | null };

function pairOf(prepared: PreparedReplay, row: number, before: Replay, after: Replay): Pair {
  return { before: prepared.judgementOf(row, before.firsts[row] ?? noChoice), after: prepared.judgementOf(row, after.firsts[row] ?? noChoice) };
}

function resultOf(pairs: readonly Pair[], changes: ChangedCase[]): ReplayResult {
  const both = pairs.flatMap(({ before, after }) => (before !== null && after !== null ? [{ before, after }] : []));
  const fair = both.map((pair) => (pair.before.contest !== null && pair.after.contest !== null ? pair : withoutContests(pair)));
  const contests = fair.flatMap(({ before, after }) => (before.contest !== null && after.contest !== null ? [[before.contest.best, after.contest.best] as const] : []));
  const count = (verdict: ChangedCase["verdict"]) => changes.filter((change) => change.verdict === verdict).length;
  return {
    cases: pairs.length,
    judged: { before: pairs.filter(({ before }) => before !== null).length, after: pairs.filter(({ after }) => after !== null).length, both: both.length },
    contested: contests.length,
    before: ratesOf(fair.map(({ before }) => before)),
    after: ratesOf(fair.map(({ after }) => after)),
    tests: {
      worked: pairedTest("worked", both.map(({ before, after }) => [before.worked, after.worked])),
      best: pairedTest("best", contests),
    },
    changed: { cases: changes.length, helped: count("helped"), hurt: count("hurt"), unknown: count("unknown") },
    changes: changes.toSorted((a, b) => a.number - b.number),
  };
}

/** A case where only one side entered a contest (the other's run has no times) counts in worked only, on both sides. */
function withoutContests({ before, after }: { before: Judgement; after: Judgement }): { before: Judgement; after: Judgement } {
  return { before: { ...before, contest: null }, after: { ...after, contest: null } };
}
