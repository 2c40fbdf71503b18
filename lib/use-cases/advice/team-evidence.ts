import { listEvidenceCases, listEvidenceRuns, recordState, type EvidenceCase, type EvidenceRun } from "@/db/queries/advice-evidence";
import { findRules, liveEditionNumber } from "@/db/queries/editions";
import type { TeamDatabase } from "@/db/scope";
import { readRecord, type Evidence, type RecordedRuns, type TimedRun } from "@/lib/advice/observations";
import type { Scope } from "@/lib/auth/guard";
import { modelVersion } from "@/lib/estimates/model-version";
import { isConverged, totalSeconds } from "@/lib/runs/comparison";
import { AppError } from "@/lib/shared/app-error";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import type { RuleSet } from "@/rules/rule-schema";

/** What advice is computed from besides the answers: the live edition and the team's record read under it. */
export type AdviceBasis = { ruleSet: RuleSet; editionNumber: number; evidence: Evidence };

/** The runs recorded last speak; older ones than this many no longer do, so that advice stays quick however long the record. */
const mostRuns = 1000;
const mostTeams = 50;

/** Teams' records as read last. An entry is good as long as neither the record nor the edition nor the model has changed. */
const readRecords = new Map<string, { key: string; basis: AdviceBasis }>();

/** Throws AppError "unavailable" while the team has no edition yet. */
export async function adviceBasis(db: TeamDatabase, scope: Scope): Promise<AdviceBasis> {
  const { asOf, version } = await recordState(db, scope);
  const editionNumber = await liveEditionNumber(db, scope);
  if (editionNumber === null) throw new AppError("unavailable", "This team's first rulebook is being prepared; try again in a minute.");
  const key = `${editionNumber}/${modelVersion}/${asOf}/${version}`;
  const known = readRecords.get(scope.teamId);
  if (known?.key === key) return known.basis;
  const basis = await readBasis(db, scope, editionNumber, asOf);
  remember(scope.teamId, key, basis);
  return basis;
}

async function readBasis(db: TeamDatabase, scope: Scope, editionNumber: number, asOf: string): Promise<AdviceBasis> {
  const ruleSet = await findRules(db, scope, editionNumber);
  if (ruleSet === null) throw new Error("The live edition can't be read.");
  const runs = asOf === "" ? [] : await listEvidenceRuns(db, scope, mostRuns);
  const cases = await listEvidenceCases(db, scope, [...new Set(runs.map(({ caseId }) => caseId))]);
  return { ruleSet, editionNumber, evidence: readRecord(recordedRuns(cases, runs), ruleSet, asOf) };
}

/** The oldest entry makes room. */
function remember(teamId: string, key: string, basis: AdviceBasis): void {
  readRecords.delete(teamId);
  readRecords.set(teamId, { key, basis });
  const oldest = readRecords.keys().next().value;
  if (readRecords.size > mostTeams && oldest !== undefined) readRecords.delete(oldest);
}

function recordedRuns(cases: readonly EvidenceCase[], runs: readonly EvidenceRun[]): RecordedRuns[] {
  const byCase = groupByCase(runs);
  return cases.map(({ id, number, title, answers }) => ({
    caseId: id,
    caseNumber: number,
    title,
    answers,
    runs: (byCase.get(id) ?? []).filter((run) => isConverged(run, answers.tolerance)).flatMap((run) => timedRun(run, answers.repeatedSolves)),
  }));
}

function groupByCase(runs: readonly EvidenceRun[]): Map<string, EvidenceRun[]> {
  const groups = new Map<string, EvidenceRun[]>();
  for (const run of runs) groups.set(run.caseId, [...(groups.get(run.caseId) ?? []), run]);
  return groups;
}

function timedRun(run: EvidenceRun, repeatedSolves: number): TimedRun[] {
  const total = totalSeconds(run, repeatedSolves);
  const strategy = strategyIdSchema.safeParse(run.strategy);
  if (total === null) return [];
  return [{ strategy: strategy.success ? strategy.data : null, strategyName: run.strategyName ?? run.strategy, cores: run.cores, totalSeconds: total }];
}
