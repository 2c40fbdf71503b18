import { z } from "zod";
import { listAudit as listAuditRows } from "@/db/queries/audit";
import { withTeam } from "@/db/scope";
import type { AuditEntry } from "@/lib/api/contract/record";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { personView } from "@/lib/use-cases/shared/views";

/** Who changed what and when, the newest first. */
export const listAudit = defineUseCase({
  permission: "audit:read",
  input: z.strictObject({ limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { limit, cursor }): Promise<{ items: AuditEntry[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const place = decodeCursor(cursor, "audit", z.tuple([z.iso.datetime({ precision: 6 }), z.uuid()]));
      const rows = await listAuditRows(db, scope, { after: place === null ? null : { atKey: place[0], id: place[1] }, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      const items = page.map(({ id, at, actorId, actorName, action, subjectKind, subjectId, detail }) => ({
        id, at: at.toISOString(), actor: personView(actorId, actorName), action, subjectKind, subjectId, detail,
      }));
      return { items, nextCursor: rows.length > limit && last ? encodeCursor("audit", [last.atKey, last.id]) : null };
    }),
});
