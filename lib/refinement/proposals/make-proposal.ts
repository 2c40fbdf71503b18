import { rateOf } from "@/lib/hit-rates/rates";
import { formatNumber, formatRatio } from "@/lib/shared/format";
import { describeSource } from "@/rules/describe";
import type { Rule } from "@/rules/rule-schema";
import { strategyAt } from "../first-choices";
import { places } from "../prepare-replay";
import type { Proposal } from "../proposal-schema";
import type { OrderedProposal } from "./order-proposals";
import { folds, lossOf, type SearchRecord } from "./search-record";

type Evidence = Proposal["evidence"];

/** A found candidate in full: the rule as it would be, in words, with what speaks for and against it. */
export function makeProposal(record: SearchRecord, found: OrderedProposal): Proposal {
  const { family, candidate } = found;
  const { change, formerRule, rule, words } = family.changeOf(candidate);
  const evidence = evidenceOf(record, found);
  return {
    key: family.key,
    kind: family.kind,
    ruleId: rule.id,
    change,
    formerRule,
    rule: change.kind === "switch-off" ? rule : withSource(rule, formerRule, evidence),
    words,
    evidence,
    sameCasesAs: found.sameCasesAs,
  };
}

function evidenceOf(record: SearchRecord, { family, candidate, heldOut, pValue }: OrderedProposal): Evidence {
  const walk = family.walks[candidate.walk];
  const cases: Evidence["cases"] = [];
  for (let position = 0; position < candidate.count; position += 1) {
    if (walk?.known[position] !== 1) continue;
    const index = walk.cases[position] ?? 0;
    const item = record.prepared.cases[record.rows[index] ?? -1]?.record;
    const [before, after] = [strategyAt(record.firsts[index]), strategyAt(walk.afters[position])];
    if (item === undefined || before === null || after === null) continue;
    cases.push({ caseId: item.caseId, number: item.caseNumber, before, after, saves: Math.exp(walk.gains[position] ?? 0) });
  }
  const casesFor = cases.filter(({ saves }) => saves > 1).length;
  return {
    casesFor,
    casesAgainst: cases.length - casesFor,
    casesUnknown: candidate.count - cases.length,
    cases: cases.sort((a, b) => a.number - b.number),
    heldOut: heldOutFigures(record, heldOut.afters),
    pValue,
  };
}

/** Best and regret of the live choice and of the held-out one, over the contested cases where both were compared. */
function heldOutFigures(record: SearchRecord, afters: Int8Array): Evidence["heldOut"] {
  const indices = record.rows.flatMap((_, index) => (Number.isNaN(lossOf(record, index, afters[index] ?? -1)) ? [] : [index]));
  const figures = (choices: Int8Array) => {
    const best = indices.filter((index) => record.best[index * places + (choices[index] ?? 0)] === 1).length;
    const loss = indices.reduce((sum, index) => sum + lossOf(record, index, choices[index] ?? -1), 0);
    return { best: rateOf(best, indices.length), regret: indices.length === 0 ? 1 : Math.exp(loss / indices.length) };
  };
  return { folds, cases: indices.length, before: figures(record.firsts), after: figures(afters) };
}

/** The rule with the record as its source; what it came from before is kept in the words. */
function withSource(rule: Rule, former: Rule | null, { casesFor, casesAgainst, casesUnknown, heldOut, pValue }: Evidence): Rule {
  const counts = `${casesFor} cases for, ${casesAgainst} against${casesUnknown > 0 ? `, ${casesUnknown} unknown` : ""}`;
  const effect = `held-out regret ${formatRatio(heldOut.before.regret, 3)} to ${formatRatio(heldOut.after.regret, 3)} over ${heldOut.cases} cases, p ${formatNumber(pValue, 2)}`;
  const before = former === null ? "" : `; before: ${describeSource(former.source)}`;
  const source: Rule["source"] = { kind: "team-evidence", numbers: `${counts}; ${effect}${before}`.slice(0, 400) };
  if (former !== null) return { ...rule, source };
  return { ...rule, source, rationale: `On the team's own runs this choice cost less than the former first choice in ${casesFor} of ${casesFor + casesAgainst} cases.` };
}
