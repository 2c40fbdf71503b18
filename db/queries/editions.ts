import { and, desc, eq, lt, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/pg-core";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import { user } from "../schema/auth";
import { advice } from "../schema/cases";
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

export async function liveEditionNumber(db: TeamDatabase, scope: Scope): Promise<number | null> {
  const rows = await db.select({ number: edition.number }).from(edition).where(eq(edition.teamId, scope.teamId)).orderBy(desc(edition.number)).limit(1);
  return rows[0]?.number ?? null;
}

/** The rules of one edition alone. */
export async function findRules(db: TeamDatabase, scope: Scope, number: number) {
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
