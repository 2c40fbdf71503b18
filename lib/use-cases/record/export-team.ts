import { z } from "zod";
import { exportSections, listExportRows, type ExportRow, type ExportSection } from "@/db/queries/export";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import { exportFormats } from "@/lib/api/contract/record";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { systemClock } from "@/lib/shared/clock";

/** Advice is large: this many rows at a time keep a page well under 50 MB. */
const pageSize = 100;
const formatName = "saddlemark-export/1";

/**
 * All of a team's data as text, piece by piece: one JSON object with a list for each section, or one object a line, `{ section, item }`.
 * Each page is a transaction of its own, so that a slow reader holds nothing; keys and passwords are in no export.
 */
export const exportTeam = defineUseCase({
  permission: "export:read",
  input: z.strictObject({ format: z.enum(exportFormats) }),
  run: async ({ scope, actor }, { format }): Promise<{ pieces: AsyncGenerator<string>; format: (typeof exportFormats)[number] }> => {
    await withTeam(scope, (db) =>
      recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "team.exported", subjectKind: "team", subjectId: scope.teamId, detail: { format } }),
    );
    const head = { format: formatName, team: { id: actor.teamId, name: actor.teamName }, exportedAt: systemClock().toISOString() };
    return { pieces: format === "json" ? asJson(scope, head) : asLines(scope, head), format };
  },
});

async function* asJson(scope: Scope, head: Record<string, unknown>): AsyncGenerator<string> {
  yield JSON.stringify(head).slice(0, -1);
  for (const section of exportSections) {
    yield `,\n${JSON.stringify(section)}:[`;
    let first = true;
    for await (const items of pages(scope, section)) {
      yield (first ? "\n" : ",\n") + items.join(",\n");
      first = false;
    }
    yield "]";
  }
  yield "}\n";
}

async function* asLines(scope: Scope, head: Record<string, unknown>): AsyncGenerator<string> {
  yield `${JSON.stringify({ section: "export", item: head })}\n`;
  for (const section of exportSections) {
    for await (const items of pages(scope, section)) yield items.map((item) => `${JSON.stringify({ section, item: parsed(item) })}\n`).join("");
  }
}

/** PostgreSQL spaces its JSON as it was asked for; read and written again it is one line. */
function parsed(item: string): unknown {
  return JSON.parse(item);
}

async function* pages(scope: Scope, section: ExportSection): AsyncGenerator<string[]> {
  let after: string | null = null;
  for (;;) {
    const position: string | null = after;
    const rows: ExportRow[] = await withTeam(scope, (db) => listExportRows(db, scope, { section, after: position, limit: pageSize }));
    if (rows.length > 0) yield rows.map(({ item }) => item);
    if (rows.length < pageSize) return;
    after = rows.at(-1)?.key ?? null;
  }
}
