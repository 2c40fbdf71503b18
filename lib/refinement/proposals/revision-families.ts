import { formatRatio } from "@/lib/shared/format";
import type { Rule } from "@/rules/rule-schema";
import { forceOf } from "../first-choices";
import type { ProposalChange } from "../proposal-schema";
import type { Family } from "./family";
import { firstsWith, type SearchRecord } from "./search-record";
import { walkOf, type Walk } from "./walk";

/** Factors that a rule's effect is tried with; 1 keeps the rationale alone. */
const factorsTried = [1, 1.2, 1.5, 2, 3, 5, 8, 12, 20] as const;

/** Switching off each enabled rule. */
export function switchOffFamilies(record: SearchRecord): Family[] {
  return record.live.ruleSet.flatMap((rule, at): Family[] => {
    if (!rule.enabled) return [];
    const walk = walkOfChange(record, at, rule, new Uint8Array(record.prepared.cases.length));
    if (walk === null) return [];
    const words = `Switch off “${rule.title}”.`;
    return [{ key: `switch-off:${rule.id}`, kind: "switch-off", walks: [walk], changeOf: () => ({ change: { kind: "switch-off" }, formerRule: rule, rule: { ...rule, enabled: false }, words }) }];
  });
}

/** One family for each favour and disfavour of an enabled rule: other factors for it. */
export function factorFamilies(record: SearchRecord): Family[] {
  return record.live.ruleSet.flatMap((rule, at) => (rule.enabled ? rule.then.flatMap((_, effect) => factorFamily(record, at, rule, effect) ?? []) : []));
}

function factorFamily(record: SearchRecord, at: number, rule: Rule, index: number): Family | null {
  const effect = rule.then[index];
  if (effect === undefined || (effect.kind !== "favour" && effect.kind !== "disfavour")) return null;
  const tried = factorsTried.filter((factor) => factor !== effect.factor).flatMap((factor) => {
    const changed = { ...rule, then: rule.then.with(index, { ...effect, factor }) };
    const walk = walkOfChange(record, at, changed, record.prepared.truthsOf(rule.when));
    return walk === null ? [] : [{ walk, changed, factor }];
  });
  if (tried.length === 0) return null;
  return {
    key: `factor:${rule.id}:${index}`,
    kind: "factor",
    walks: tried.map(({ walk }) => walk),
    changeOf: (candidate) => {
      const { changed, factor } = tried[candidate.walk] ?? { changed: rule, factor: effect.factor };
      const change: ProposalChange = { kind: "factor", effect: index, strategy: effect.strategy, from: effect.factor, to: factor };
      const words = `In “${rule.title}” ${effect.kind} ${effect.strategy} by ${formatRatio(factor)} instead of ${formatRatio(effect.factor)}.`;
      return { change, formerRule: rule, rule: changed, words };
    },
  };
}

/** A single change as a walk with one end; null where too few cases know of it. */
function walkOfChange(record: SearchRecord, at: number, rule: Rule, truths: Uint8Array): Walk | null {
  const afters = firstsWith(record, at, forceOf(rule), truths);
  const changed = record.rows.flatMap((_, index) => {
    const after = afters[index] ?? -1;
    return after === record.firsts[index] ? [] : [{ index, after }];
  });
  return walkOf(record, changed.map((step, position) => ({ ...step, tag: position === changed.length - 1 ? 0 : null })));
}
