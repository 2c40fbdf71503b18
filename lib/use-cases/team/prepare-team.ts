import { recordAudit } from "@/db/queries/record-audit";
import { claimFirstContents, insertFirstEdition, insertFirstMachine } from "@/db/queries/team-first-contents";
import { withSystemTeam } from "@/db/scope";
import { defaultRates, type Machine } from "@/lib/questionnaire/machine";
import { firstEdition } from "@/rules/sets/first-edition";

/** The machine sheet every team begins with. */
export const firstMachine: Machine = { name: "32-core server", coresPerNode: 32, nodes: 1, memoryPerNodeGiB: 128, ...defaultRates };

/**
 * Gives a new team its first edition and a machine sheet, with audit rows, in one transaction.
 * Safe to repeat: returns false when the team has them. Called at once when a team is made, and by a job should that have failed.
 */
export function prepareTeam(team: { teamId: string; ownerId: string }): Promise<boolean> {
  return withSystemTeam(team.teamId, async (db) => {
    if (!(await claimFirstContents(db, team.teamId))) return false;
    const editionId = await insertFirstEdition(db, { teamId: team.teamId, rules: firstEdition, note: "The rules every team begins with." });
    const machineId = await insertFirstMachine(db, { teamId: team.teamId, sheet: firstMachine });
    const entry = { teamId: team.teamId, actorId: null };
    await recordAudit(db, { ...entry, action: "edition.published", subjectKind: "edition", subjectId: editionId, detail: { number: 1, origin: "first" } });
    await recordAudit(db, { ...entry, action: "machine.added", subjectKind: "machine", subjectId: machineId, detail: { name: firstMachine.name } });
    return true;
  });
}
