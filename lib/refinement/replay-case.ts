import type { Advice } from "@/lib/advice/advice";
import { byStrategy } from "@/lib/advice/evidence";
import { deriveFacts, type Estimates } from "@/lib/advice/facts";
import { standingOf } from "@/lib/advice/feasibility";
import type { Estimate } from "@/lib/estimates/estimate";
import { estimateAll } from "@/lib/estimates/estimate-all";
import type { HitRateRecord } from "@/lib/hit-rates/record";
import type { Priority } from "@/lib/questionnaire/answer-sets";
import type { Answers } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Sizes } from "@/lib/sizes/sizes";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { strategies } from "@/lib/strategies/index";
import type { Facts } from "@/rules/fact";

/** One strategy on one case, as it stands before any rule. */
export type ReplayCandidate = {
  /** Whether discretisation, program and memory let it compete. */
  mayCompete: boolean;
  estimate: Pick<Estimate, "memoryGiB" | "totalSeconds">;
  /** What the record said when the advice was given; 1 without runs. */
  evidenceFactor: number;
};

/** A recorded case with all that a replay needs of it; plain data. */
export type ReplayCase = {
  record: HitRateRecord;
  facts: Facts;
  priority: Priority;
  candidates: Readonly<Record<StrategyId, ReplayCandidate>>;
};

/**
 * A case as its stored advice saw it: estimates, run counts and evidence factors are those frozen in `advice`, the one that `record` judges.
 * So live edition and draft differ by their rules alone, and no run speaks in the evidence it is judged by. Costs tens of microseconds.
 */
export function replayCaseOf(record: HitRateRecord, answers: Answers, advice: Pick<Advice, "sizes" | "ranking">): ReplayCase {
  const entries = new Map(advice.ranking.map((entry) => [entry.strategy, entry]));
  const entryOf = (strategy: StrategyId) => {
    const entry = entries.get(strategy);
    if (entry === undefined) throw new RangeError(`The advice on case ${record.caseNumber} does not rank ${strategy}.`);
    return entry;
  };
  const estimates = byStrategy((strategy) => entryOf(strategy).estimate);
  const counts = byStrategy((strategy) => entryOf(strategy).evidenceRuns);
  const evidenceFactorOf = (strategy: StrategyId) => entryOf(strategy).factors.find(({ kind }) => kind === "evidence")?.factor ?? 1;
  return caseOf(record, answers, { sizes: advice.sizes, estimates, counts, evidenceFactorOf });
}

/** A case without stored advice, such as a reference run: estimated by today's model (some milliseconds) and without evidence. */
export function replayCaseFromModel(record: HitRateRecord, answers: Answers): ReplayCase {
  const sizes = computeSizes(answers);
  return caseOf(record, answers, { sizes, estimates: estimateAll(answers, sizes), counts: byStrategy(() => 0), evidenceFactorOf: () => 1 });
}

type Seen = {
  sizes: Sizes;
  estimates: Estimates;
  counts: Readonly<Record<StrategyId, number>>;
  evidenceFactorOf: (strategy: StrategyId) => number;
};

function caseOf(record: HitRateRecord, answers: Answers, { sizes, estimates, counts, evidenceFactorOf }: Seen): ReplayCase {
  return {
    record,
    facts: deriveFacts(answers, sizes, estimates, counts),
    priority: answers.priority,
    candidates: byStrategy((strategy) => ({
      mayCompete: standingOf(answers, strategies[strategy], estimates[strategy], []).status === "ranked",
      estimate: { memoryGiB: estimates[strategy].memoryGiB, totalSeconds: estimates[strategy].totalSeconds },
      evidenceFactor: evidenceFactorOf(strategy),
    })),
  };
}
