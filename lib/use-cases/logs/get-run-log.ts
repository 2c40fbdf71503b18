import { z } from "zod";
import { findRunLog } from "@/db/queries/logs";
import { findRun } from "@/db/queries/runs";
import { withTeam } from "@/db/scope";
import { runLogSchema, type RunLogView } from "@/lib/api/contract/logs";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { runNotFound } from "@/lib/use-cases/runs/get-run";
import { findDiagnosis } from "./find-diagnosis";

/** What was read from a run's log, and the run's diagnosis as it stands now. Throws AppError "not-found", also for a run without a log. */
export const getRunLog = defineUseCase({
  permission: "runs:read",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<RunLogView> =>
    withTeam(scope, async (db) => {
      const row = await findRun(db, scope, id);
      if (row === null) throw runNotFound();
      const log = await findRunLog(db, scope, id);
      if (log === null) throw new AppError("not-found", "This run was recorded without a log.");
      const { findings } = await findDiagnosis(db, scope, row);
      const { parsed, fileName, bytes, sha256 } = log;
      return runLogSchema.parse({ parsed, findings, fileName, bytes, sha256, readAt: log.createdAt.toISOString() });
    }),
});
