import { z } from "zod";
import { findCasesForRuns, type CaseForRuns } from "@/db/queries/cases";
import { recordAudit } from "@/db/queries/record-audit";
import { insertRuns, latestAdviceOf, type NewRun } from "@/db/queries/runs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { importResultSchema } from "@/lib/api/contract/runs";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { AppError, type FieldError } from "@/lib/shared/app-error";
import { systemClock } from "@/lib/shared/clock";
import { saveCase } from "@/lib/use-cases/cases/create-case";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";
import { importRefused, readImport, rowPath, type ReadImport } from "./read-import";
import { runValues } from "./run-values";

type Rows = ReadImport["rows"];
export type ImportResult = z.output<typeof importResultSchema>;

const mostNewCases = 1000;
const insertSize = 1000;

/** Imports runs, all rows or none. Rows with equal questionnaires become runs of one new case. */
export const importRuns = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({
    format: z.enum(["csv", "ndjson"]),
    chunks: z.custom<AsyncIterable<Uint8Array>>((value) => typeof value === "object" && value !== null && Symbol.asyncIterator in value),
    idempotencyKey: z.string().nullable().default(null),
  }),
  run: async ({ scope }, { format, chunks, idempotencyKey }): Promise<Repeatable<ImportResult>> => {
    // Read to its end before the transaction begins: a slow sender holds nothing.
    const { rows, hash } = await readImport(chunks, format);
    return withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: `importRuns ${format}`, body: hash, response: importResultSchema }, () => importRows(db, scope, rows)),
    );
  },
});

async function importRows(db: TeamDatabase, scope: Scope, rows: Rows): Promise<ImportResult> {
  const known = await findKnownCases(db, scope, rows);
  const made = await makeCases(db, scope, rows);
  const now = systemClock();
  const newRuns = rows.map(({ row }): NewRun => {
    const target = row.target.kind === "case" ? known.get(row.target.ref) : made.get(JSON.stringify(row.target.questionnaire));
    if (target === undefined) throw new Error("A row lost its case.");
    return { ...runValues(row.run, target.cores, now), caseId: target.id, adviceId: target.adviceId, source: "import" };
  });
  const runIds: string[] = [];
  for (let start = 0; start < newRuns.length; start += insertSize) runIds.push(...(await insertRuns(db, scope, newRuns.slice(start, start + insertSize))));
  const detail = { runs: runIds.length, casesCreated: made.size };
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "runs.imported", subjectKind: "team", subjectId: scope.teamId, detail });
  return { ...detail, runIds };
}

async function findKnownCases(db: TeamDatabase, scope: Scope, rows: Rows): Promise<Map<string, CaseForRuns>> {
  const refs = new Set(rows.flatMap(({ row }) => (row.target.kind === "case" ? [row.target.ref] : [])));
  const found = await findCasesForRuns(db, scope, [...refs]);
  const byRef = new Map(found.flatMap((one) => [[one.id, one] as const, [String(one.number), one] as const]));
  const lost = rows.flatMap(({ place, row }) => (row.target.kind === "case" && !byRef.has(row.target.ref.toLowerCase()) ? [place] : []));
  if (lost.length > 0) throw importRefused(lost.length, lost.slice(0, 100).map((place) => ({ path: rowPath(place, "caseId"), message: "This team has no such case." })));
  for (const ref of refs) byRef.set(ref, byRef.get(ref.toLowerCase()) ?? unreachable());
  return byRef;
}

function unreachable(): never {
  throw new Error("A case was found and is gone.");
}

async function makeCases(db: TeamDatabase, scope: Scope, rows: Rows): Promise<Map<string, CaseForRuns>> {
  const made = new Map<string, CaseForRuns>();
  const errors: FieldError[] = [];
  const tried = new Set<string>();
  for (const { place, row } of rows) {
    if (row.target.kind !== "questionnaire") continue;
    const { questionnaire } = row.target;
    const key = JSON.stringify(questionnaire);
    if (tried.has(key)) continue;
    tried.add(key);
    if (tried.size > mostNewCases) throw new AppError("invalid", `An import makes at most ${mostNewCases} new cases; send it in parts.`);
    try {
      const { id, number } = await saveCase(db, scope, questionnaire, rowPath(place, "questionnaire"));
      const advice = await latestAdviceOf(db, scope, id);
      made.set(key, { id, number, cores: questionnaire.hardware.cores, adviceId: advice?.id ?? null });
    } catch (error) {
      // Refused answers are collected, so that one answer names them all; the transaction ends below.
      if (!(error instanceof AppError) || error.code !== "invalid" || errors.length >= 100) throw error;
      errors.push(...error.fields);
    }
  }
  if (errors.length > 0) throw importRefused(tried.size - made.size, errors);
  return made;
}
