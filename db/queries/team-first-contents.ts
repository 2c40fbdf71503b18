import type { Machine } from "@/lib/questionnaire/machine";
import type { RuleSet } from "@/rules/rule-schema";
import { machine, teamCounter } from "../schema/cases";
import { edition } from "../schema/rulebook";
import type { TeamDatabase } from "../scope";

/** Starts the team's counters, edition 1 taken. Returns false when they were there already; a second caller waits for the first. */
export async function claimFirstContents(db: TeamDatabase, teamId: string): Promise<boolean> {
  const rows = await db
    .insert(teamCounter)
    .values({ teamId, nextCase: 1, nextEdition: 2 })
    .onConflictDoNothing()
    .returning({ teamId: teamCounter.teamId });
  return rows.length === 1;
}

export async function insertFirstEdition(db: TeamDatabase, params: { teamId: string; rules: RuleSet; note: string }): Promise<string> {
  const rows = await db
    .insert(edition)
    .values({ ...params, number: 1, origin: "first" })
    .returning({ id: edition.id });
  const row = rows[0];
  if (!row) throw new Error("The first edition was not stored.");
  return row.id;
}

export async function insertFirstMachine(db: TeamDatabase, params: { teamId: string; sheet: Machine }): Promise<string> {
  const rows = await db
    .insert(machine)
    .values({ teamId: params.teamId, ...params.sheet })
    .returning({ id: machine.id });
  const row = rows[0];
  if (!row) throw new Error("The first machine sheet was not stored.");
  return row.id;
}
