import { z } from "zod";
import { findCase } from "@/db/queries/cases";
import { listRuns as listRunRows } from "@/db/queries/runs";
import { withTeam } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import type { RunView } from "@/lib/api/contract/runs";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { runView } from "./run-view";

const sort = "runs";
const placeSchema = z.tuple([z.iso.datetime({ precision: 6 }), z.uuid()]);

/** Runs of a case in the order in which they were measured. */
export const listRuns = defineUseCase({
  permission: "runs:read",
  input: z.strictObject({ caseRef: caseRefSchema, limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { caseRef, limit, cursor }): Promise<{ items: RunView[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const place = decodeCursor(cursor, sort, placeSchema);
      const found = await findCase(db, scope, caseRefOf(caseRef));
      if (found === null) throw caseNotFound();
      const after = place === null ? null : { measuredKey: place[0], id: place[1] };
      // One more than asked for shows whether there is a next page.
      const rows = await listRunRows(db, scope, { caseId: found.id, after, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      const nextCursor = rows.length > limit && last ? encodeCursor(sort, [last.measuredKey, last.id]) : null;
      return { items: page.map(runView), nextCursor };
    }),
});
