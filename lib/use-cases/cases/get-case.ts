import { z } from "zod";
import { findCase, listCaseAdvice, type CaseAdviceRow, type CaseRow } from "@/db/queries/cases";
import { listCases } from "@/db/queries/cases-list";
import { listRuns } from "@/db/queries/runs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { diffAdvice } from "@/lib/advice/diff";
import { givenAdviceSchema, type CaseDetail, type CaseSummary, type GivenAdvice } from "@/lib/api/contract/cases";
import { caseRefSchema, largestPage } from "@/lib/api/contract/common";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { caseLimits } from "@/lib/runs/case-limits";
import { strategyName } from "@/lib/strategies/strategy-names";
import { runView } from "@/lib/use-cases/runs/run-view";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { personView } from "@/lib/use-cases/shared/views";
import { summarise } from "./list-cases";

/** One case with all advice given on it, the latest in full, and its runs with what was predicted for them. */
export const getCase = defineUseCase({
  permission: "cases:read",
  input: z.strictObject({ caseRef: caseRefSchema }),
  run: ({ scope }, { caseRef }): Promise<CaseDetail> =>
    withTeam(scope, async (db) => {
      const found = await findCase(db, scope, caseRefOf(caseRef));
      if (found === null) throw caseNotFound();
      return readDetail(db, scope, found);
    }),
});

async function readDetail(db: TeamDatabase, scope: Scope, found: CaseRow): Promise<CaseDetail> {
  const given = await listCaseAdvice(db, scope, found.id);
  const [latest, previous] = given;
  if (latest === undefined) throw new Error("A case without advice.");
  const runs = await listRuns(db, scope, { caseId: found.id, after: null, limit: largestPage });
  return {
    ...(await readSummary(db, scope, found)),
    questionnaire: found.questionnaire,
    machine: { id: found.machineId, name: found.answers.hardware.machineName },
    limits: caseLimits(found.answers),
    advice: latest.content,
    adviceId: latest.id,
    adviceGiven: given.map(givenAdvice),
    adviceChanges: previous === undefined ? [] : diffAdvice(previous.content, latest.content, strategyName).map(({ text }) => text),
    runList: runs.map(runView),
  };
}

async function readSummary(db: TeamDatabase, scope: Scope, found: CaseRow): Promise<CaseSummary> {
  const sort = { column: "number", descending: false } as const;
  const [summary] = await summarise(db, scope, await listCases(db, scope, { ids: [found.id], sort, after: null, limit: 1 }));
  if (summary === undefined) throw caseNotFound();
  return summary;
}

function givenAdvice(row: CaseAdviceRow): GivenAdvice {
  return givenAdviceSchema.parse({
    ...row,
    edition: row.editionNumber,
    givenBy: personView(row.createdBy, row.creatorName),
    givenAt: row.createdAt.toISOString(),
  });
}
