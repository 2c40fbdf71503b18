import { z } from "zod";
import { listDrafts as listDraftRows } from "@/db/queries/drafts";
import { withTeam } from "@/db/scope";
import { draftStatuses, type DraftSummary } from "@/lib/api/contract/drafts";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { draftSummary } from "./draft-view";

/** Drafts of one status, or those that are not done with. */
export const listDrafts = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ limit: z.int().min(1).max(200), cursor: z.string().optional(), status: z.enum(draftStatuses).optional() }),
  run: ({ scope }, { limit, cursor, status }): Promise<{ items: DraftSummary[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const list = `drafts/${status ?? ""}`;
      const place = decodeCursor(cursor, list, z.tuple([z.string(), z.uuid()]));
      const after = place === null ? null : { updatedKey: place[0], id: place[1] };
      const rows = await listDraftRows(db, scope, { statuses: status === undefined ? ["open", "submitted"] : [status], after, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      return { items: page.map(draftSummary), nextCursor: rows.length > limit && last ? encodeCursor(list, [last.updatedKey, last.id]) : null };
    }),
});
