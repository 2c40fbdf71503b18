import { sql } from "drizzle-orm";
import { pgPolicy, pgRole } from "drizzle-orm/pg-core";

/** Login role of the web server and the worker for team data: owns nothing, cannot bypass row-level security. Made by db/migrate. */
export const appRole = pgRole("saddlemark_app").existing();
/** Login role of better-auth: sees accounts, sessions and memberships, none of a team's data. Made by db/migrate. */
export const authRole = pgRole("saddlemark_auth").existing();

/** The team of the present transaction, set by `withTeam`; null when none is set, which matches no row. */
export const currentTeam = sql`nullif(current_setting('app.team_id', true), '')`;

/** Rows of the present team only, for reading and writing. */
export function teamPolicy(table: string) {
  return pgPolicy(`${table}_team`, {
    as: "permissive",
    for: "all",
    to: appRole,
    using: sql`team_id = ${currentTeam}`,
    withCheck: sql`team_id = ${currentTeam}`,
  });
}
