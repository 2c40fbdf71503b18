import { complements, fullDomain, isEmpty, narrow, type Domain } from "./domain";
import { findFact } from "./facts";
import type { Comparison, Condition } from "./rule-schema";

/** Past this many clauses no claim is made. */
const clauseLimit = 2000;

type Clause = readonly Comparison[];

/**
 * Whether some case could make the condition true, facts taken as independent of each other: false is a proof, true is not (facts may
 * exclude each other in ways that only counting shows). Null when the condition has too many branches to tell or does not fit its facts.
 * Method: disjunctive normal form, then one interval or set per fact.
 */
export function canHold(condition: Condition): boolean | null {
  const clauses = expand(condition, true);
  if (clauses === null) return null;
  let unsure = false;
  for (const clause of clauses) {
    const possible = isPossible(clause);
    if (possible) return true;
    if (possible === null) unsure = true;
  }
  return unsure ? null : false;
}

/** Whether some case could make the condition false; same caveats. */
export function canFail(condition: Condition): boolean | null {
  return canHold({ not: condition });
}

/** Whether every case that makes `first` true makes `second` true; false where it can't be proved. */
export function implies(first: Condition, second: Condition): boolean {
  return canHold({ all: [first, { not: second }] }) === false;
}

function expand(condition: Condition, positive: boolean): readonly Clause[] | null {
  if ("fact" in condition) {
    return [[positive ? condition : { ...condition, operator: complements[condition.operator] }]];
  }
  if ("not" in condition) return expand(condition.not, !positive);
  const members = "all" in condition ? condition.all : condition.any;
  return "all" in condition === positive ? product(members, positive) : union(members, positive);
}

function union(members: readonly Condition[], positive: boolean): readonly Clause[] | null {
  const clauses: Clause[] = [];
  for (const member of members) {
    const expanded = expand(member, positive);
    if (expanded === null || clauses.length + expanded.length > clauseLimit) return null;
    clauses.push(...expanded);
  }
  return clauses;
}

function product(members: readonly Condition[], positive: boolean): readonly Clause[] | null {
  let clauses: readonly Clause[] = [[]];
  for (const member of members) {
    const expanded = expand(member, positive);
    if (expanded === null || clauses.length * expanded.length > clauseLimit) return null;
    clauses = clauses.flatMap((clause) => expanded.map((more) => [...clause, ...more]));
  }
  return clauses;
}

function isPossible(clause: Clause): boolean | null {
  const domains = new Map<string, Domain>();
  for (const comparison of clause) {
    const definition = findFact(comparison.fact);
    if (!definition) return null;
    const domain = domains.get(comparison.fact) ?? fullDomain(definition);
    domains.set(comparison.fact, narrow(domain, comparison));
  }
  return [...domains.values()].every((domain) => !isEmpty(domain));
}
