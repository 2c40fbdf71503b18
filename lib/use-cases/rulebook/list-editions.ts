import { z } from "zod";
import { listEditions as listEditionRows, liveEditionNumber, type EditionRow } from "@/db/queries/editions";
import { withTeam } from "@/db/scope";
import type { EditionSummary } from "@/lib/api/contract/record";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { personView } from "@/lib/use-cases/shared/views";

/** Editions of the rulebook, the live one first. */
export const listEditions = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { limit, cursor }): Promise<{ items: EditionSummary[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const place = decodeCursor(cursor, "editions", z.tuple([z.int().min(1).max(2 ** 31 - 1)]));
      const live = await liveEditionNumber(db, scope);
      const rows = await listEditionRows(db, scope, { before: place?.[0] ?? null, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      return { items: page.map((row) => editionSummary(row, live)), nextCursor: rows.length > limit && last ? encodeCursor("editions", [last.number]) : null };
    }),
});

export function editionSummary(row: EditionRow, liveNumber: number | null): EditionSummary {
  return {
    number: row.number,
    live: row.number === liveNumber,
    rules: row.ruleCount,
    note: row.note,
    origin: row.origin,
    submittedBy: personView(row.submittedBy, row.submitterName),
    approvedBy: personView(row.approvedBy, row.approverName),
    alone: row.alone,
    publishedAt: row.publishedAt.toISOString(),
    advice: row.advice,
  };
}
