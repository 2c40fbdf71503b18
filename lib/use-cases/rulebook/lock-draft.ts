import { findDraft, lockDraft as lockDraftRow, type DraftRow, type DraftStatus } from "@/db/queries/drafts";
import type { TeamDatabase } from "@/db/scope";
import type { Scope } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { formatDateTime } from "@/lib/shared/format-date";
import { draftNotFound } from "./draft-view";

type Expected = { id: string; statuses: readonly DraftStatus[]; /** The version that the caller has read; null for any. */ version: number | null };

const statusWords: Record<DraftStatus, string> = {
  open: "This draft is open; submit it first.",
  submitted: "This draft is submitted for approval; withdraw the submission to change it.",
  published: "This draft was published; start a new one to change the rules again.",
  discarded: "This draft was discarded; start a new one.",
};

/**
 * The draft, locked until the transaction ends. Throws AppError "not-found", or "conflict" when its status or its version is not what the
 * caller went by: it then says who saved the draft meanwhile, and when.
 */
export async function lockDraft(db: TeamDatabase, scope: Scope, { id, statuses, version }: Expected): Promise<DraftRow> {
  if (!(await lockDraftRow(db, scope, id))) throw draftNotFound();
  const row = await findDraft(db, scope, id);
  if (row === null) throw draftNotFound();
  if (!statuses.includes(row.status)) throw new AppError("conflict", statusWords[row.status]);
  if (version !== null && version !== row.version) throw staleVersion(row, version, scope);
  return row;
}

function staleVersion(row: DraftRow, version: number, scope: Scope): AppError {
  const who = row.updatedBy === scope.userId ? "You, in another window," : (row.editorName ?? "A former member");
  return new AppError("conflict", `${who} saved version ${row.version} of this draft on ${formatDateTime(row.updatedAt)}; your changes began from version ${version}. Nothing was saved over it.`, {
    fields: [{ path: "version", message: `The draft is at version ${row.version} now.` }],
  });
}
