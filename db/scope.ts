import { sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import { appDatabase, authDatabase, type Database } from "./client";

/** A transaction that sees one team's rows; the only thing queries run on. */
export type TeamDatabase = Parameters<Parameters<Database["transaction"]>[0]>[0];

/** A transaction of better-auth's role: memberships of every team, a team's own data of none. */
export type AccountDatabase = TeamDatabase;

/**
 * Runs `work` in one transaction that sees the scope's team and no other.
 * Rolls back when `work` throws; the setting ends with the transaction, so a pooled connection carries no team over.
 */
export function withTeam<T>(scope: Scope, work: (db: TeamDatabase) => Promise<T>): Promise<T> {
  return runForTeam(appDatabase(), scope.teamId, work);
}

/** The same for job handlers and seeds, which act for a team and not for a person. */
export function withSystemTeam<T>(teamId: string, work: (db: TeamDatabase) => Promise<T>): Promise<T> {
  return runForTeam(appDatabase(), teamId, work);
}

/** Changes of a team's membership: one transaction for the change, its audit row and its mail. */
export function withTeamAccounts<T>(teamId: string, work: (db: AccountDatabase) => Promise<T>): Promise<T> {
  return runForTeam(authDatabase(), teamId, work);
}

function runForTeam<T>(database: Database, teamId: string, work: (db: TeamDatabase) => Promise<T>): Promise<T> {
  if (teamId === "") throw new Error("A team is needed.");
  return database.transaction(async (db) => {
    await db.execute(sql`select set_config('app.team_id', ${teamId}, true)`);
    return work(db);
  });
}
