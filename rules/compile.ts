import { compileTest } from "./compare";
import type { Facts, FactValue } from "./fact";
import type { FiredRule } from "./engine";
import type { Comparison, Condition, RuleSet } from "./rule-schema";
import { falseTruth, negate, trueTruth, truthOf, unknownTruth, type Truth } from "./truth";

/** Truth of a condition on one case. */
export type Evaluator = (facts: Facts) => Truth;

/** Facts of many cases by name: `columns.get(name)[row]`, undefined where a case lacks the fact. All columns have `rows` entries. */
export type FactColumns = { rows: number; columns: ReadonlyMap<string, readonly (FactValue | undefined)[]> };

/** A rule set ready for evaluation without json-rules-engine. Results are by rule, in the edition's order. */
export type CompiledRuleSet = {
  ruleSet: RuleSet;
  /** Truth of each rule on one case; rules switched off are false. */
  evaluate: (facts: Facts) => Truth[];
  /** Rules that are surely true on one case. */
  fired: (facts: Facts) => FiredRule[];
  /** Truth of each rule on each row: `evaluateColumns(c)[rule][row]`. */
  evaluateColumns: (columns: FactColumns) => Uint8Array[];
};

/**
 * Compile a rule set to closures in three-valued (Kleene) logic: equal to json-rules-engine where all facts are present; where one is
 * absent, what depends on it is unknown. Throws RangeError for `in` without a list. Work is O(comparisons) per case.
 * Kleene, "Introduction to Metamathematics", 1952, section 64 (the strong tables).
 */
export function compileRuleSet(ruleSet: RuleSet): CompiledRuleSet {
  const evaluators = ruleSet.map(({ enabled, when }) => (enabled ? compileCondition(when) : never));
  const evaluate = (facts: Facts) => evaluators.map((evaluator) => evaluator(facts));
  return {
    ruleSet,
    evaluate,
    fired: (facts) => ruleSet.flatMap((rule, index) => (evaluators[index]?.(facts) === trueTruth ? [{ rule, index }] : [])),
    evaluateColumns: (columns) => evaluateRuleColumns(ruleSet, columns),
  };
}

const never: Evaluator = () => falseTruth;

/** One condition as a closure. */
export function compileCondition(condition: Condition): Evaluator {
  if ("all" in condition) return compileEvery(condition.all.map(compileCondition));
  if ("any" in condition) return compileSome(condition.any.map(compileCondition));
  if ("not" in condition) {
    const inner = compileCondition(condition.not);
    return (facts) => negate(inner(facts));
  }
  return compileComparison(condition);
}

function compileComparison(comparison: Comparison): Evaluator {
  const test = compileTest(comparison);
  const { fact } = comparison;
  return (facts) => {
    const value = Object.hasOwn(facts, fact) ? facts[fact] : undefined;
    return value === undefined ? unknownTruth : truthOf(test(value));
  };
}

/** Conjunction: the least of its members; stops at the first false. */
function compileEvery(members: readonly Evaluator[]): Evaluator {
  return (facts) => {
    let result: Truth = trueTruth;
    for (const member of members) {
      const truth = member(facts);
      if (truth === falseTruth) return falseTruth;
      if (truth === unknownTruth) result = unknownTruth;
    }
    return result;
  };
}

/** Disjunction: the greatest of its members; stops at the first true. */
function compileSome(members: readonly Evaluator[]): Evaluator {
  return (facts) => {
    let result: Truth = falseTruth;
    for (const member of members) {
      const truth = member(facts);
      if (truth === trueTruth) return trueTruth;
      if (truth === unknownTruth) result = unknownTruth;
    }
    return result;
  };
}

/** Gather the columns of many cases' facts; `names` limits them to those that are needed. */
export function columnsOf(cases: readonly Facts[], names: Iterable<string>): FactColumns {
  const columns = new Map<string, readonly (FactValue | undefined)[]>();
  for (const name of names) columns.set(name, cases.map((facts) => (Object.hasOwn(facts, name) ? facts[name] : undefined)));
  return { rows: cases.length, columns };
}

/** Names of the facts a condition asks about, each once, in reading order. */
export function factNamesOf(condition: Condition, found: Set<string> = new Set()): Set<string> {
  if ("fact" in condition) found.add(condition.fact);
  else if ("not" in condition) factNamesOf(condition.not, found);
  else for (const member of "all" in condition ? condition.all : condition.any) factNamesOf(member, found);
  return found;
}

type ColumnMemo = Map<string, Uint8Array>;

/** Equal comparisons of several rules are evaluated once. */
function evaluateRuleColumns(ruleSet: RuleSet, columns: FactColumns): Uint8Array[] {
  const memo: ColumnMemo = new Map();
  return ruleSet.map(({ enabled, when }) => (enabled ? conditionColumn(when, columns, memo) : new Uint8Array(columns.rows)));
}

/** Truth of a condition on every row. The result may be shared through `memo` and must not be written to. */
export function conditionColumn(condition: Condition, columns: FactColumns, memo: ColumnMemo = new Map()): Uint8Array {
  if ("fact" in condition) return comparisonColumn(condition, columns, memo);
  const result = new Uint8Array(columns.rows);
  if ("not" in condition) {
    const inner = conditionColumn(condition.not, columns, memo);
    for (let row = 0; row < result.length; row += 1) result[row] = trueTruth - (inner[row] ?? unknownTruth);
    return result;
  }
  const every = "all" in condition;
  result.fill(every ? trueTruth : falseTruth);
  for (const member of every ? condition.all : condition.any) {
    const column = conditionColumn(member, columns, memo);
    for (let row = 0; row < result.length; row += 1) {
      const kept = result[row] ?? unknownTruth;
      const truth = column[row] ?? unknownTruth;
      if (every ? truth < kept : truth > kept) result[row] = truth;
    }
  }
  return result;
}

function comparisonColumn(comparison: Comparison, { rows, columns }: FactColumns, memo: ColumnMemo): Uint8Array {
  const key = JSON.stringify([comparison.fact, comparison.operator, comparison.value]);
  const known = memo.get(key);
  if (known) return known;
  const result = new Uint8Array(rows).fill(unknownTruth);
  const values = columns.get(comparison.fact);
  const test = compileTest(comparison);
  for (let row = 0; row < rows; row += 1) {
    const value = values?.[row];
    if (value !== undefined) result[row] = truthOf(test(value));
  }
  memo.set(key, result);
  return result;
}
