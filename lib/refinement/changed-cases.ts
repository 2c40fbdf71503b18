import type { Judgement } from "@/lib/hit-rates/record";
import { formatSeconds } from "@/lib/shared/format";
import { trueTruth } from "@/rules/truth";
import { noChoice, strategyAt, type RuleForce } from "./first-choices";
import type { PreparedReplay } from "./prepare-replay";
import type { Replay } from "./replay";
import type { ChangedCase, Verdict } from "./replay-result";

/** The cases of `rows` (first, one past the last) whose first choice differs, each with what the runs say and the rules that did it. */
export function changesBetween(prepared: PreparedReplay, before: Replay, after: Replay, [from, to]: readonly [number, number]): ChangedCase[] {
  const found: ChangedCase[] = [];
  const rules = pairRules(before, after);
  for (let row = from; row < to; row += 1) {
    const record = prepared.cases[row]?.record;
    const [was, is] = [before.firsts[row] ?? noChoice, after.firsts[row] ?? noChoice];
    if (record === undefined || was === is) continue;
    found.push({
      caseId: record.caseId,
      number: record.caseNumber,
      before: strategyAt(was),
      after: strategyAt(is),
      ...verdictOf(prepared, row, was, is),
      rules: causesOf(rules, row, was, is),
    });
  }
  return found;
}

type Told = Pick<ChangedCase, "verdict" | "timeRatio" | "text">;

function verdictOf(prepared: PreparedReplay, row: number, was: number, is: number): Told {
  const [old, now] = [prepared.judgementOf(row, was), prepared.judgementOf(row, is)];
  if (is === noChoice) return unknown("The draft lets no strategy compete.");
  if (now === null) return unknown("The new first choice has no compared run.");
  if (was === noChoice) return unknown("The live edition lets no strategy compete.");
  if (old === null) return unknown("The former first choice has no compared run.");
  const costs = costPair(old, now);
  const timeRatio = costs === null ? null : costs[1] / Math.max(costs[0], Number.MIN_VALUE);
  if (old.worked !== now.worked) {
    const text = now.worked ? "The new first choice worked, the former did not." : "The former first choice worked, the new one did not.";
    return { verdict: now.worked ? "helped" : "hurt", timeRatio, text };
  }
  if (costs === null) return unknown(now.worked ? "Both worked; one has no times." : "Neither worked.");
  if (costs[0] === costs[1]) return { verdict: "unknown", timeRatio: 1, text: now.worked ? "Both took the same time." : "Neither worked, at the same cost." };
  const verdict: Verdict = costs[1] < costs[0] ? "helped" : "hurt";
  return { verdict, timeRatio, text: `${now.worked ? "Both worked" : "Neither worked"}: ${formatSeconds(costs[1])} instead of ${formatSeconds(costs[0])}.` };
}

function unknown(text: string): Told {
  return { verdict: "unknown", timeRatio: null, text };
}

/** Total times of the two runs, failed ones at their penalty; null unless both entered the contest. */
function costPair(old: Judgement, now: Judgement): [old: number, now: number] | null {
  const costs = now.contest?.costs;
  const [was, is] = [costs?.get(old.strategy), costs?.get(now.strategy)];
  return was === undefined || is === undefined ? null : [was, is];
}

type Side = { force: RuleForce; truths: Uint8Array } | null;
type PairedRule = { id: string; before: Side; after: Side };

/** Rules of both sides by id, in the draft's order, then those it lacks. */
function pairRules(before: Replay, after: Replay): PairedRule[] {
  const [old, now] = [sidesOf(before), sidesOf(after)];
  return [...new Set([...now.keys(), ...old.keys()])].map((id) => ({ id, before: old.get(id) ?? null, after: now.get(id) ?? null }));
}

function sidesOf({ ruleSet, forces, truths }: Replay): Map<string, Side> {
  return new Map(ruleSet.map(({ id }, index) => [id, sideOf(forces[index], truths[index])]));
}

function sideOf(force: RuleForce | undefined, truths: Uint8Array | undefined): Side {
  return force === undefined || truths === undefined ? null : { force, truths };
}

/** How far each rule moved the new first choice ahead of the former, in logarithms; an exclusion made or lifted counts as infinite. */
function causesOf(rules: readonly PairedRule[], row: number, was: number, is: number): string[] {
  const pull = (side: Side, place: number) => (side === null || side.truths[row] !== trueTruth ? 0 : pullOn(side.force, place));
  const lead = (side: Side) => bounded(pull(side, was)) - bounded(pull(side, is));
  const moves = rules.map(({ id, before, after }) => ({ id, move: lead(after) - lead(before) })).filter(({ move }) => move > 1e-12);
  return moves.toSorted((a, b) => b.move - a.move).map(({ id }) => id);
}

function pullOn({ factors, excluded }: RuleForce, place: number): number {
  if (excluded.includes(place)) return Infinity;
  return factors.reduce((sum, factor) => (factor.place === place ? sum + Math.log(factor.factor) : sum), 0);
}

/** Far beyond any product of factors, so that differences of exclusions stay numbers. */
const beyondFactors = 1e6;

function bounded(pull: number): number {
  return Math.min(pull, beyondFactors);
}
