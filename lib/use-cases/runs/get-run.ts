import { z } from "zod";
import { findRun, listRevisions } from "@/db/queries/runs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import type { RunDetailView } from "@/lib/api/contract/runs";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { findDiagnosis } from "@/lib/use-cases/logs/find-diagnosis";
import { revisionView, runView } from "./run-view";

export type RunDetail = RunDetailView;

/** One run with its diagnosis and what it said before each correction. */
export const getRun = defineUseCase({
  permission: "runs:read",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<RunDetail> => withTeam(scope, (db) => readRunDetail(db, scope, id)),
});

/** Throws AppError "not-found". */
export async function readRunDetail(db: TeamDatabase, scope: Scope, id: string): Promise<RunDetail> {
  const row = await findRun(db, scope, id);
  if (row === null) throw runNotFound();
  const revisions = await listRevisions(db, scope, id);
  const { findings, hasLog } = await findDiagnosis(db, scope, row);
  return { ...runView(row), revisions: revisions.map(revisionView), findings, hasLog };
}

export function runNotFound(): AppError {
  return new AppError("not-found", "This team has no such run.");
}
