import { z } from "zod";
import { listCases as listCaseRows, type CaseListParams, type CaseListRow, type SortColumn } from "@/db/queries/cases-list";
import { listHitRateRecords } from "@/db/queries/hit-rates";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { caseSorts, caseStatuses, caseSummarySchema, type CaseStatus, type CaseSort, type CaseSummary } from "@/lib/api/contract/cases";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { drillDownSchema, judgeAll, selectRecords, type Result } from "@/lib/hit-rates/filter";
import { judge } from "@/lib/hit-rates/record";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import { personView } from "@/lib/use-cases/shared/views";

export const caseFilterInput = drillDownSchema.extend({
  q: z.string().optional(),
  strategy: strategyIdSchema.optional(),
  status: z.enum(caseStatuses).optional(),
  author: z.string().optional(),
  sort: z.enum(caseSorts).default("-number"),
});
export type CaseFilterInput = z.output<typeof caseFilterInput>;

/** A page of the team's cases: filtered, sorted, each with how it came out. */
export const listCases = defineUseCase({
  permission: "cases:read",
  input: caseFilterInput.extend({ limit: z.int().min(1).max(200), cursor: z.string().optional() }),
  run: ({ scope }, { limit, cursor, ...filter }): Promise<{ items: CaseSummary[]; nextCursor: string | null }> =>
    withTeam(scope, async (db) => {
      const after = decodeCursor(cursor, filter.sort, placeSchemas[sortOf(filter.sort).column]);
      const selection = await caseSelection(db, scope, filter);
      return readPage(db, scope, { ...selection, limit, after: after === null ? null : { value: after[0], number: after[1] } }, filter.sort);
    }),
});

const numberPlace = z.tuple([z.number(), z.int()]);
const placeSchemas: Record<SortColumn, z.ZodType<[string | number, number]>> = {
  number: z.tuple([z.int(), z.int()]),
  title: z.tuple([z.string(), z.int()]),
  unknowns: numberPlace,
  degree: z.tuple([z.int(), z.int()]),
};

export function sortOf(sort: CaseSort): CaseListParams["sort"] {
  const sorts: Record<CaseSort, CaseListParams["sort"]> = {
    number: { column: "number", descending: false },
    "-number": { column: "number", descending: true },
    title: { column: "title", descending: false },
    "-title": { column: "title", descending: true },
    unknowns: { column: "unknowns", descending: false },
    "-unknowns": { column: "unknowns", descending: true },
    degree: { column: "degree", descending: false },
    "-degree": { column: "degree", descending: true },
  };
  return sorts[sort];
}

export type CaseSelection = Omit<CaseListParams, "after" | "limit">;

/** The filter in the database's terms. What depends on judging is judged here, by the one set of definitions, and handed on as ids. */
export async function caseSelection(db: TeamDatabase, scope: Scope, filter: CaseFilterInput): Promise<CaseSelection> {
  const { q, strategy, status, author, sort, ...drillDown } = filter;
  const { discretisation, meshFamily, degree } = drillDown;
  const plain = { search: q === "" ? undefined : q, strategy, authorId: author, discretisation, meshFamily, degree, sort: sortOf(sort) };
  return { ...plain, ...(await judgedSelection(db, scope, drillDown, status)) };
}

type DrillDownInput = z.output<typeof drillDownSchema>;

async function judgedSelection(db: TeamDatabase, scope: Scope, drillDown: DrillDownInput, status: CaseStatus | undefined): Promise<Partial<CaseSelection>> {
  const asksForRecord = recordNames.some((name) => drillDown[name] !== undefined);
  if (!asksForRecord && status === undefined) return {};
  if (!asksForRecord && status === "no-run") return { hasRun: false };
  const judged = judgeAll(await listHitRateRecords(db, scope));
  const matching = selectRecords(judged, drillDown);
  const wanted = status === undefined ? undefined : statusResult[status];
  const ids = (wanted === undefined ? matching : selectRecords(matching, { result: wanted })).map(({ record }) => record.caseId);
  return status === "no-run" || status === "run" ? { ids, hasRun: status === "run" } : { ids };
}

const recordNames = ["advised", "edition", "from", "to", "month", "rule", "result"] as const satisfies readonly (keyof DrillDownInput)[];
const statusResult: Record<CaseStatus, Result> = { "no-run": "not-judged", run: "not-judged", worked: "worked", missed: "missed" };

async function readPage(db: TeamDatabase, scope: Scope, params: CaseListParams, sort: CaseSort) {
  // One more than asked for shows whether there is a next page.
  const rows = await listCaseRows(db, scope, { ...params, limit: params.limit + 1 });
  const page = rows.slice(0, params.limit);
  const items = await summarise(db, scope, page);
  const last = page.at(-1);
  return { items, nextCursor: rows.length > params.limit && last ? encodeCursor(sort, [last.sortValue, last.number]) : null };
}

/** Rows as the API shows them, each judged by the record. */
export async function summarise(db: TeamDatabase, scope: Scope, rows: readonly CaseListRow[]): Promise<CaseSummary[]> {
  const records = await listHitRateRecords(db, scope, { caseIds: rows.map(({ id }) => id) });
  const judgements = new Map(records.map((record) => [record.caseId, judge(record)]));
  return rows.map((row) => {
    const worked = judgements.get(row.id)?.worked;
    const status: CaseStatus = worked === undefined ? (row.runs > 0 ? "run" : "no-run") : worked ? "worked" : "missed";
    return caseSummarySchema.parse({
      ...row,
      edition: row.editionNumber,
      status,
      author: personView(row.authorId, row.authorName),
      createdAt: row.createdAt.toISOString(),
      activeAt: (row.lastRecordedAt ?? row.createdAt).toISOString(),
    });
  });
}
