import { byStrategy } from "@/lib/advice/evidence";
import type { ComparedRun, HitRateRecord } from "@/lib/hit-rates/record";
import type { ReplayCase } from "@/lib/refinement/replay-case";
import { spreadRange } from "@/lib/shared/range";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Facts } from "@/rules/fact";

export type SyntheticCase = {
  number: number;
  facts: Facts;
  /** Total time by the model; strategies that are not named may not compete. */
  predicted: Partial<Record<StrategyId, number>>;
  /** Measured total time; null for a run that stalled. */
  measured: Partial<Record<StrategyId, number | null>>;
  measuredAt?: string;
  first?: StrategyId;
  firedRules?: readonly string[];
};

export function runOf(strategy: string, seconds: number | null, id: string, measuredAt: string): ComparedRun {
  return {
    runId: id, strategy, outcome: seconds === null ? "stalled" : "converged", iterations: 20, setupSeconds: seconds === null ? null : 0, solveSeconds: seconds,
    peakMemoryGiB: 1, cores: 32, trueRelativeResidual: seconds === null ? null : 1e-7, measuredAt,
  };
}

/** A recorded case made without any model of estimates. */
export function syntheticCase({ number, facts, predicted, measured, measuredAt = "2026-11-05T10:00:00.000Z", first, firedRules = [] }: SyntheticCase): ReplayCase {
  const runs = Object.entries(measured).map(([strategy, seconds]) => runOf(strategy, seconds, `run-${number}-${strategy}`, measuredAt));
  const advisedRun = runs.find(({ strategy }) => strategy === first) ?? null;
  const record: HitRateRecord = {
    caseId: `case-${number}`, caseNumber: number, discretisation: "vem-mixed", degree: 1, meshFamily: "cubes",
    limits: { tolerance: 1e-6, repeatedSolves: 1, timeLimitSeconds: null, memoryGiB: 128, cores: 32 },
    advice: { id: `advice-${number}`, editionNumber: 1, firstStrategy: first ?? null, firedRules, givenAt: "2026-11-01T00:00:00.000Z" },
    advisedRun,
    otherRuns: runs.filter((run) => run !== advisedRun),
  };
  return {
    record,
    facts,
    priority: "time",
    candidates: byStrategy((strategy) => ({
      mayCompete: predicted[strategy] !== undefined,
      estimate: { memoryGiB: spreadRange(1, 1.5), totalSeconds: spreadRange(predicted[strategy] ?? 1e9, 1.5) },
      evidenceFactor: 1,
    })),
  };
}
