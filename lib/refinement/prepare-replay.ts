import { priorityWeight } from "@/lib/advice/priority";
import { judge, type Judgement } from "@/lib/hit-rates/record";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { conditionColumn, factNamesOf } from "@/rules/compile";
import type { FactValue } from "@/rules/fact";
import type { Condition } from "@/rules/rule-schema";
import type { ReplayCase } from "./replay-case";

/** Strategies by their place in `strategyIds`; tables below hold `places` entries a row. */
export const places = strategyIds.length;

/** What decides between strategies on each case before any rule, row by row. */
export type CandidateTable = {
  mayCompete: Uint8Array;
  totalSeconds: Float64Array;
  evidenceFactor: Float64Array;
  memoryGiB: Float64Array;
  /** Factor of the priorities time and robustness; 1 where the priority is memory, which depends on who competes. */
  priorityFactor: Float64Array;
  /** By row: 1 where the priority is memory. */
  memoryFirst: Uint8Array;
};

/** A record set ready for many rule sets. Columns, truths and judgements are made when first asked for, and kept. */
export type PreparedReplay = {
  cases: readonly ReplayCase[];
  table: CandidateTable;
  /** A fact's value on each case, undefined where it is absent. */
  valuesOf: (fact: string) => readonly (FactValue | undefined)[];
  /** Kleene truth of a condition on each case; shared, not to be written to. */
  truthsOf: (condition: Condition) => Uint8Array;
  /** How the case came out had the strategy at `place` been advised; null where it has no compared run. */
  judgementOf: (row: number, place: number) => Judgement | null;
};

/** Gather a record set once. O(cases x strategies); throws RangeError where two cases share an id. */
export function prepareReplay(cases: readonly ReplayCase[]): PreparedReplay {
  if (new Set(cases.map(({ record }) => record.caseId)).size !== cases.length) throw new RangeError("Two cases of a replay share an id.");
  const columns = new Map<string, readonly (FactValue | undefined)[]>();
  const truths = new Map<string, Uint8Array>();
  const judgements = cases.map(() => new Map<number, Judgement | null>());
  const valuesOf = (fact: string) => {
    const found = columns.get(fact) ?? cases.map(({ facts }) => (Object.hasOwn(facts, fact) ? facts[fact] : undefined));
    columns.set(fact, found);
    return found;
  };
  return {
    cases,
    table: candidateTable(cases),
    valuesOf,
    truthsOf: (condition) => {
      for (const name of factNamesOf(condition)) valuesOf(name);
      return conditionColumn(condition, { rows: cases.length, columns }, truths);
    },
    judgementOf: (row, place) => {
      const known = judgements[row]?.get(place);
      if (known !== undefined) return known;
      const made = judgeAs(cases[row], place);
      judgements[row]?.set(place, made);
      return made;
    },
  };
}

function candidateTable(cases: readonly ReplayCase[]): CandidateTable {
  const length = cases.length * places;
  const table: CandidateTable = {
    mayCompete: new Uint8Array(length),
    totalSeconds: new Float64Array(length),
    evidenceFactor: new Float64Array(length),
    memoryGiB: new Float64Array(length),
    priorityFactor: new Float64Array(length),
    memoryFirst: new Uint8Array(cases.length),
  };
  cases.forEach(({ candidates, priority }, row) => {
    table.memoryFirst[row] = priority === "memory" ? 1 : 0;
    strategyIds.forEach((strategy, place) => {
      const at = row * places + place;
      const { mayCompete, estimate, evidenceFactor } = candidates[strategy];
      table.mayCompete[at] = mayCompete ? 1 : 0;
      table.totalSeconds[at] = estimate.totalSeconds.median;
      table.evidenceFactor[at] = evidenceFactor;
      table.memoryGiB[at] = estimate.memoryGiB.median;
      table.priorityFactor[at] = priority === "memory" ? 1 : priorityWeight(priority, estimate, 0);
    });
  });
  return table;
}

/** The hit-rate definitions with another strategy in the advised one's place. */
function judgeAs(item: ReplayCase | undefined, place: number): Judgement | null {
  if (item === undefined) return null;
  const { record } = item;
  const runs = record.advisedRun === null ? record.otherRuns : [record.advisedRun, ...record.otherRuns];
  const advisedRun = runs.find(({ strategy }) => strategy === strategyIds[place]);
  return advisedRun === undefined ? null : judge({ ...record, advisedRun, otherRuns: runs.filter((run) => run !== advisedRun) });
}
