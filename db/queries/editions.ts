import { and, desc, eq, lt, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/pg-core";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import type { RuleSet } from "@/rules/rule-schema";
import { user } from "../schema/auth";
import { advice, teamCounter } from "../schema/cases";
import { edition } from "../schema/rulebook";
import type { TeamDatabase } from "../scope";

const submitter = alias(user, "submitter");
const approver = alias(user, "approver");

const summary = {
  number: edition.number,
  ruleCount: sql<number>`jsonb_array_length(${edition.rules})`,
  note: edition.note,
  origin: edition.origin,
  submittedBy: edition.submittedBy,
  submitterName: submitter.name,
  approvedBy: edition.approvedBy,
  approverName: approver.name,
  alone: edition.alone,
  publishedAt: edition.publishedAt,
  advice: sql<number>`(select count(*)::int from ${advice} a where a.team_id = ${edition.teamId} and a.edition_number = ${edition.number})`,
};
export type EditionRow = Awaited<ReturnType<typeof listEditions>>[number];

/** The highest number first: it is the live one. */
export async function listEditions(db: TeamDatabase, scope: Scope, params: { before: number | null; limit: number }) {
  return db
    .select(summary)
    .from(edition)
    .leftJoin(submitter, eq(submitter.id, edition.submittedBy))
    .leftJoin(approver, eq(approver.id, edition.approvedBy))
    .where(and(eq(edition.teamId, scope.teamId), params.before === null ? undefined : lt(edition.number, params.before)))
    .orderBy(desc(edition.number))
    .limit(params.limit);
}

export async function findEdition(db: TeamDatabase, scope: Scope, number: number) {
  const rows = await db
    .select({ ...summary, rules: edition.rules })
    .from(edition)
    .leftJoin(submitter, eq(submitter.id, edition.submittedBy))
    .leftJoin(approver, eq(approver.id, edition.approvedBy))
    .where(and(eq(edition.teamId, scope.teamId), eq(edition.number, number)));
  return rows[0] ?? null;
}

export async function liveEditionNumber(db: TeamDatabase, scope: Pick<Scope, "teamId">): Promise<number | null> {
  const rows = await db.select({ number: edition.number }).from(edition).where(eq(edition.teamId, scope.teamId)).orderBy(desc(edition.number)).limit(1);
  return rows[0]?.number ?? null;
}

/** Waits for whoever else does one of the things that a team does one at a time, until the transaction ends. */
export async function lockCounter(db: TeamDatabase, scope: Scope): Promise<void> {
  await db.select({ teamId: teamCounter.teamId }).from(teamCounter).where(eq(teamCounter.teamId, scope.teamId)).for("update");
}

/** Takes the team's next edition number; its counter stays locked until the transaction ends, so that two publications wait for each other. */
export async function takeEditionNumber(db: TeamDatabase, scope: Scope): Promise<number> {
  const [row] = await db
    .update(teamCounter)
    .set({ nextEdition: sql`${teamCounter.nextEdition} + 1` })
    .where(eq(teamCounter.teamId, scope.teamId))
    .returning({ nextEdition: teamCounter.nextEdition });
  if (!row) throw new Error("The team's counter gave no edition number.");
  return row.nextEdition - 1;
}

export type NewEdition = { number: number; rules: RuleSet; note: string; submittedBy: string | null; alone: boolean; origin: string };

/** Editions are only ever added: the role may neither change nor delete one. */
export async function insertEdition(db: TeamDatabase, scope: Scope, params: NewEdition): Promise<{ id: string }> {
  const [row] = await db
    .insert(edition)
    .values({ ...params, teamId: scope.teamId, approvedBy: scope.userId })
    .returning({ id: edition.id });
  if (!row) throw new Error("The edition was not stored.");
  return row;
}

/** The rules of one edition alone. */
export async function findRules(db: TeamDatabase, scope: Pick<Scope, "teamId">, number: number) {
  const rows = await db.select({ rules: edition.rules }).from(edition).where(and(eq(edition.teamId, scope.teamId), eq(edition.number, number)));
  return rows[0]?.rules ?? null;
}

const firedSchema = z.array(z.object({ rule: z.string(), count: z.int() }));

/** For each rule in how many pieces of advice under the edition it fired; rules that never did are not listed. */
export async function countFired(db: TeamDatabase, scope: Scope, number: number) {
  const { rows } = await db.execute(sql`
    select fired.rule, count(*)::int as count
    from ${advice} a, unnest(a.fired_rules) as fired(rule)
    where a.team_id = ${scope.teamId} and a.edition_number = ${number}
    group by fired.rule order by fired.rule`);
  return firedSchema.parse(rows);
}
