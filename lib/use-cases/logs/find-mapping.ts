import { z } from "zod";
import { findLogMapping, findLogMappingByName, type LogMappingRow } from "@/db/queries/logs";
import type { TeamDatabase } from "@/db/scope";
import { logMappingViewSchema, type LogMappingView } from "@/lib/api/contract/logs";
import type { Scope } from "@/lib/auth/guard";
import { logMappingSchema, type LogMapping } from "@/lib/logs/mapping";
import { AppError } from "@/lib/shared/app-error";
import { personView } from "@/lib/use-cases/shared/views";

/** A team's log format by id or name. Throws AppError "not-found". */
export async function findMapping(db: TeamDatabase, scope: Scope, idOrName: string): Promise<LogMapping> {
  const byId = z.uuid().safeParse(idOrName).success ? await findLogMapping(db, scope, idOrName) : null;
  const row = byId ?? (await findLogMappingByName(db, scope, idOrName));
  if (row === null) throw mappingNotFound();
  return logMappingSchema.parse(row.mapping);
}

export function mappingView(row: LogMappingRow): LogMappingView {
  const mapping = logMappingSchema.parse(row.mapping);
  return logMappingViewSchema.parse({ ...mapping, id: row.id, createdBy: personView(row.createdBy, row.creatorName), createdAt: row.createdAt.toISOString() });
}

export function mappingNotFound(): AppError {
  return new AppError("not-found", "This team has no such log format.");
}

export function mappingNameTaken(name: string): AppError {
  return new AppError("invalid", "Another log format has this name.", { fields: [{ path: "name", message: `The team has a log format named ${name}.` }] });
}
