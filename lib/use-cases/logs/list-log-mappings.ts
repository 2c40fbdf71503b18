import { z } from "zod";
import { listLogMappings as listRows } from "@/db/queries/logs";
import { withTeam } from "@/db/scope";
import type { LogMappingView } from "@/lib/api/contract/logs";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { mappingView } from "./find-mapping";

/** The team's own log formats by name. */
export const listLogMappings = defineUseCase({
  permission: "runs:read",
  input: z.strictObject({ limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { limit, cursor }): Promise<{ items: LogMappingView[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const place = decodeCursor(cursor, "log-mappings", z.tuple([z.string()]));
      const rows = await listRows(db, scope, { after: place?.[0] ?? null, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      return { items: page.map(mappingView), nextCursor: rows.length > limit && last ? encodeCursor("log-mappings", [last.name]) : null };
    }),
});
