import { z } from "zod";
import { listMachines as listMachineRows } from "@/db/queries/machines";
import { withTeam } from "@/db/scope";
import type { MachineView } from "@/lib/api/contract/machines";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase } from "@/lib/auth/guard";
import { machineView } from "./machine-view";

/** Machine sheets of the team by name. */
export const listMachines = defineUseCase({
  permission: "machines:read",
  input: z.strictObject({ limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { limit, cursor }): Promise<{ items: MachineView[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const place = decodeCursor(cursor, "machines", z.tuple([z.string()]));
      const rows = await listMachineRows(db, scope, { after: place?.[0] ?? null, limit: limit + 1 });
      const page = rows.slice(0, limit);
      const last = page.at(-1);
      return { items: page.map(machineView), nextCursor: rows.length > limit && last ? encodeCursor("machines", [last.name]) : null };
    }),
});
