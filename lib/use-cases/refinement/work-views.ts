import { findReplay, findSearch, type ReplayRow, type SearchRow } from "@/db/queries/replays";
import type { TeamDatabase } from "@/db/scope";
import type { ReplaySummary, ReplayView, SearchSummary, SearchView } from "@/lib/api/contract/refinement";
import type { Scope } from "@/lib/auth/guard";
import { proposalResultSchema } from "@/lib/refinement/proposal-schema";
import { replayResultSchema } from "@/lib/refinement/replay-result";
import { AppError } from "@/lib/shared/app-error";
import { personView } from "@/lib/use-cases/shared/views";

export function replaySummary(row: ReplayRow): ReplaySummary {
  return { ...workSummary(row), draftId: row.draftId, draftVersion: row.draftVersion, editionNumber: row.editionNumber };
}

export function searchSummary(row: SearchRow): SearchSummary {
  return { ...workSummary(row), editionNumber: row.editionNumber };
}

/** A replay with its result. Throws AppError "not-found". */
export async function readReplay(db: TeamDatabase, scope: Scope, params: { draftId: string; id: string }): Promise<ReplayView> {
  const row = await findReplay(db, scope, params);
  if (row === null) throw new AppError("not-found", "This draft has no such replay.");
  return { ...replaySummary(row), result: row.result === null ? null : replayResultSchema.parse(row.result) };
}

/** A search with what it proposes. Throws AppError "not-found". */
export async function readSearch(db: TeamDatabase, scope: Scope, id: string): Promise<SearchView> {
  const row = await findSearch(db, scope, id);
  if (row === null) throw new AppError("not-found", "This team has no such search.");
  return { ...searchSummary(row), result: row.result === null ? null : proposalResultSchema.parse(row.result) };
}

function workSummary(row: ReplayRow | SearchRow) {
  return {
    id: row.id,
    status: row.status,
    progress: row.progress,
    failure: row.failure,
    createdBy: personView(row.createdBy, row.creatorName),
    createdAt: row.createdAt.toISOString(),
    finishedAt: row.finishedAt?.toISOString() ?? null,
  };
}
