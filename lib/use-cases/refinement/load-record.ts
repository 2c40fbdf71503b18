import { listHitRateRecords } from "@/db/queries/hit-rates";
import { listAdvisedCases } from "@/db/queries/replays";
import { withSystemTeam } from "@/db/scope";
import type { HitRateRecord } from "@/lib/hit-rates/record";
import { replayCaseFromModel, replayCaseOf, type ReplayCase } from "@/lib/refinement/replay-case";

type LoadOptions = { onProgress: (share: number) => void; signal: AbortSignal };

const casesAtOnce = 200;

/**
 * Every recorded case of a team as its judged advice saw it, ready to be replayed, by case number. A transaction for each 200 cases, so that
 * nobody waits for it. Rejects with the signal's reason when it is aborted.
 */
export async function loadRecord(teamId: string, { onProgress, signal }: LoadOptions): Promise<ReplayCase[]> {
  const records = await withSystemTeam(teamId, (db) => listHitRateRecords(db, { teamId }));
  const cases: ReplayCase[] = [];
  for (let from = 0; from < records.length; from += casesAtOnce) {
    signal.throwIfAborted();
    cases.push(...(await loadCases(teamId, records.slice(from, from + casesAtOnce))));
    onProgress(Math.min(1, (from + casesAtOnce) / records.length));
  }
  return cases;
}

async function loadCases(teamId: string, records: readonly HitRateRecord[]): Promise<ReplayCase[]> {
  const rows = await withSystemTeam(teamId, (db) => listAdvisedCases(db, { teamId, adviceIds: records.map(({ advice }) => advice.id) }));
  const byAdvice = new Map(rows.map((row) => [row.adviceId, row]));
  return records.flatMap((record) => {
    const row = byAdvice.get(record.advice.id);
    return row === undefined ? [] : [caseOf(record, row)];
  });
}

/** Advice of an older product may not know every strategy of today; such a case is estimated anew. */
function caseOf(record: HitRateRecord, { answers, sizes, ranking }: Awaited<ReturnType<typeof listAdvisedCases>>[number]): ReplayCase {
  try {
    return replayCaseOf(record, answers, { sizes, ranking });
  } catch (error) {
    if (error instanceof RangeError) return replayCaseFromModel(record, answers);
    throw error;
  }
}
