import { and, asc, eq, gt, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import type { Machine } from "@/lib/questionnaire/machine";
import { machine, solverCase } from "../schema/cases";
import type { TeamDatabase } from "../scope";

const columns = {
  id: machine.id,
  name: machine.name,
  coresPerNode: machine.coresPerNode,
  nodes: machine.nodes,
  memoryPerNodeGiB: machine.memoryPerNodeGiB,
  bandwidthPerNodeGBps: machine.bandwidthPerNodeGBps,
  gflopsPerCore: machine.gflopsPerCore,
  networkLatencyMicroseconds: machine.networkLatencyMicroseconds,
  networkBandwidthGBps: machine.networkBandwidthGBps,
  demonstration: machine.demonstration,
  createdAt: machine.createdAt,
  // Written out: without a join drizzle leaves the table's name away, and "id" would be the case's.
  cases: sql<number>`(select count(*)::int from ${solverCase} c where c.team_id = "machine"."team_id" and c.machine_id = "machine"."id")`,
};
export type MachineRow = Awaited<ReturnType<typeof listMachines>>[number];

/** By name; names are unique in a team. */
export async function listMachines(db: TeamDatabase, scope: Scope, params: { after: string | null; limit: number }) {
  const beyond = params.after === null ? undefined : gt(machine.name, params.after);
  return db.select(columns).from(machine).where(and(eq(machine.teamId, scope.teamId), beyond)).orderBy(asc(machine.name)).limit(params.limit);
}

export async function findMachine(db: TeamDatabase, scope: Scope, id: string): Promise<MachineRow | null> {
  const rows = await db.select(columns).from(machine).where(and(eq(machine.teamId, scope.teamId), eq(machine.id, id)));
  return rows[0] ?? null;
}

/** Holds the sheet until the transaction ends. */
export async function lockMachine(db: TeamDatabase, scope: Scope, id: string): Promise<boolean> {
  const rows = await db.select({ id: machine.id }).from(machine).where(and(eq(machine.teamId, scope.teamId), eq(machine.id, id))).for("update");
  return rows.length === 1;
}

/** Null when another sheet of the team has the name. */
export async function insertMachine(db: TeamDatabase, scope: Scope, sheet: Machine): Promise<string | null> {
  const rows = await db
    .insert(machine)
    .values({ ...sheet, teamId: scope.teamId, createdBy: scope.userId })
    .onConflictDoNothing({ target: [machine.teamId, machine.name] })
    .returning({ id: machine.id });
  return rows[0]?.id ?? null;
}

export async function isNameTaken(db: TeamDatabase, scope: Scope, params: { name: string; exceptId: string }): Promise<boolean> {
  const rows = await db
    .select({ id: machine.id })
    .from(machine)
    .where(and(eq(machine.teamId, scope.teamId), eq(machine.name, params.name), sql`${machine.id} <> ${params.exceptId}`));
  return rows.length > 0;
}

export async function updateMachine(db: TeamDatabase, scope: Scope, params: { id: string; changes: Partial<Machine> }): Promise<void> {
  await db
    .update(machine)
    .set(params.changes)
    .where(and(eq(machine.teamId, scope.teamId), eq(machine.id, params.id)));
}

export async function deleteMachine(db: TeamDatabase, scope: Scope, id: string): Promise<void> {
  await db.delete(machine).where(and(eq(machine.teamId, scope.teamId), eq(machine.id, id)));
}
