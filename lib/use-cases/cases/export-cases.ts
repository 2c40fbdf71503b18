import { listCases } from "@/db/queries/cases-list";
import { withTeam } from "@/db/scope";
import { largestPage } from "@/lib/api/contract/common";
import type { CaseSummary } from "@/lib/api/contract/cases";
import { defineUseCase } from "@/lib/auth/guard";
import { csvLine, csvLineEnd } from "@/lib/shared/csv";
import { caseFilterInput, caseSelection, summarise } from "./list-cases";

const columns = [
  "number", "title", "discretisation", "degree", "meshFamily", "contrastRatio", "unknowns", "cores", "firstStrategy", "edition", "status", "runs", "author", "createdAt", "activeAt",
] as const satisfies readonly (keyof CaseSummary)[];

/** The filtered cases as CSV in the list's order, a page at a time: no long list is ever held as a whole. */
export const exportCases = defineUseCase({
  permission: "cases:read",
  input: caseFilterInput,
  run: async ({ scope }, filter): Promise<AsyncGenerator<string>> => {
    const selection = await withTeam(scope, (db) => caseSelection(db, scope, filter));
    return lines();

    async function* lines(): AsyncGenerator<string> {
      yield csvLine(columns) + csvLineEnd;
      let after: { value: string | number; number: number } | null = null;
      for (;;) {
        const params = { ...selection, after, limit: largestPage };
        const page = await withTeam(scope, async (db) => {
          const rows = await listCases(db, scope, params);
          const last = rows.at(-1);
          return { items: await summarise(db, scope, rows), last: last ? { value: last.sortValue, number: last.number } : null };
        });
        if (page.items.length > 0) yield page.items.map((item) => csvLine(columns.map((name) => cellOf(item, name))) + csvLineEnd).join("");
        if (page.items.length < largestPage) return;
        after = page.last;
      }
    }
  },
});

function cellOf(item: CaseSummary, name: (typeof columns)[number]): string | number | null {
  return name === "author" ? (item.author?.name ?? null) : item[name];
}
