import { z } from "zod";
import { findCase } from "@/db/queries/cases";
import { findRunLog, insertRunLog, listRunsForDiagnosis } from "@/db/queries/logs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { logLimitBytes, logReadSchema, type LogQuery, type LogRead } from "@/lib/api/contract/logs";
import { bodyEncodings, unpackBody } from "@/lib/api/unpack-body";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import type { ParsedLog } from "@/lib/logs/parsed-log";
import { caseLimits } from "@/lib/runs/case-limits";
import { diagnoseRun } from "@/lib/runs/diagnosis/diagnose-run";
import type { DiagnosedRun } from "@/lib/runs/diagnosis/diagnosis-input";
import { AppError } from "@/lib/shared/app-error";
import { storeRun } from "@/lib/use-cases/runs/store-run";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";
import { findMapping } from "./find-mapping";
import { readLogStream, type ReadStream } from "./read-log-stream";
import { reportFromLog } from "./report-from-log";

/** What is remembered under an Idempotency-Key: the rest of the answer follows from the log that the repeat sends again. */
const rememberedSchema = z.object({ runId: z.string().nullable() });

type Reading = { caseRef: string; query: LogQuery; read: ReadStream };

/** Reads a solver's log and records it as a run when log and corrections say enough; with `record` false it only reads. */
export const readLog = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({
    caseRef: caseRefSchema,
    query: z.custom<LogQuery>((value) => typeof value === "object" && value !== null),
    chunks: z.custom<AsyncIterable<Uint8Array>>((value) => typeof value === "object" && value !== null && Symbol.asyncIterator in value),
    encoding: z.enum(bodyEncodings),
    idempotencyKey: z.string().nullable().default(null),
  }),
  run: async ({ scope }, { caseRef, query, chunks, encoding, idempotencyKey }): Promise<Repeatable<LogRead>> => {
    // Whether case and mapping are there is asked before the body is read; the body is read before the transaction that records begins.
    const mapping = await withTeam(scope, async (db) => {
      if ((await findCase(db, scope, caseRefOf(caseRef))) === null) throw caseNotFound();
      return query.mapping === undefined ? null : findMapping(db, scope, query.mapping);
    });
    const read = await readLogStream(unpackBody(chunks, { announced: encoding, limitBytes: logLimitBytes }), mapping);
    const reading = { caseRef, query, read };
    return withTeam(scope, async (db) => {
      const body = { sha256: read.sha256, query, mapping };
      const { replayed, response } = await withIdempotency(db, scope, { key: idempotencyKey, operation: `readLog ${caseRef}`, body, response: rememberedSchema }, async () => ({
        runId: await record(db, scope, reading),
      }));
      return { replayed, response: await answer(db, scope, reading, response.runId) };
    });
  },
});

/** Id of the recorded run, null when none is wanted or too little is known. Throws AppError "invalid" when one was insisted on, or a correction can't be used. */
async function record(db: TeamDatabase, scope: Scope, { caseRef, query, read }: Reading): Promise<string | null> {
  if (query.record === false) return null;
  const made = reportFromLog(read.parsed, query);
  if (made.kind === "refused") throw new AppError("invalid", "The run can't be recorded with these values.", { fields: made.fields });
  if (made.kind === "missing") {
    if (query.record === true) throw new AppError("invalid", "The log does not say enough to record a run.", { fields: made.fields });
    return null;
  }
  const row = await storeRun(db, scope, { caseRef, report: made.report, source: query.source });
  const parsed = { ...read.parsed, problems: [...read.parsed.problems, ...made.doubts] };
  const otherRuns = await listRunsForDiagnosis(db, scope, { caseId: row.caseId, exceptRunId: row.id });
  const findings = diagnoseRun({ run: row, parsed, limits: caseLimits(row.answers), otherRuns });
  await insertRunLog(db, scope, { caseId: row.caseId, runId: row.id, fileName: query.fileName ?? "", bytes: read.bytes, sha256: read.sha256, parsed, findings });
  return row.id;
}

async function answer(db: TeamDatabase, scope: Scope, { caseRef, query, read }: Reading, runId: string | null): Promise<LogRead> {
  if (runId !== null) {
    const kept = await findRunLog(db, scope, runId);
    return logReadSchema.parse({ parsed: kept?.parsed, findings: kept?.findings, runId });
  }
  const found = await findCase(db, scope, caseRefOf(caseRef));
  if (found === null) throw caseNotFound();
  const otherRuns = await listRunsForDiagnosis(db, scope, { caseId: found.id, exceptRunId: null });
  const findings = diagnoseRun({ run: unrecorded(read.parsed, query), parsed: read.parsed, limits: caseLimits(found.answers), otherRuns });
  return { parsed: read.parsed, findings, runId: null };
}

/** The run as it would be recorded, as far as it is known. */
function unrecorded(parsed: ParsedLog, query: LogQuery): DiagnosedRun {
  const made = reportFromLog(parsed, query);
  return made.kind === "report" ? made.report : { ...parsed, strategy: query.strategy ?? parsed.strategy, cores: parsed.processes };
}
