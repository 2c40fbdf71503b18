import { randomBytes, randomUUID } from "node:crypto";
import { hashPassword } from "better-auth/crypto";
import { drizzle, type NodePgDatabase } from "drizzle-orm/node-postgres";
import type pg from "pg";
import { firstEdition } from "@/rules/sets/first-edition";
import type { Advice } from "@/lib/advice/advice";
import { account, member, organization, user } from "../schema/auth";
import { advice, machine, solverCase, teamCounter } from "../schema/cases";
import { audit, edition } from "../schema/rulebook";
import { run } from "../schema/runs";
import { demonstrationCases, type DemonstrationCase, type DemonstrationPlan, type SavedMachine } from "./demonstration-cases";
import { basinTeam, basinThemes, harbourTeam, harbourThemes, type DemonstrationTeam, type Theme } from "./story";

export type DemonstrationAccount = { email: string; password: string; role: string; team: string };

type Database = NodePgDatabase<Record<string, never>>;
type Transaction = Parameters<Parameters<Database["transaction"]>[0]>[0];
type Person = { id: string; role: string };

const plans: readonly { team: DemonstrationTeam; themes: readonly Theme[]; cases: number; runs: number; seed: number }[] = [
  { team: basinTeam, themes: basinThemes, cases: 52, runs: 225, seed: 20261201 },
  { team: harbourTeam, themes: harbourThemes, cases: 9, runs: 30, seed: 77 },
];

/**
 * Fills an empty database with two invented teams, their people, machines, cases and runs, in one transaction. Passwords are random and
 * returned for the accounts' file; nothing of the teams depends on them. `now` ends the invented record.
 */
export async function seedDemonstration(client: pg.Client, now: Date): Promise<DemonstrationAccount[]> {
  const database = drizzle(client);
  return database.transaction(async (db) => {
    const accounts: DemonstrationAccount[] = [];
    for (const plan of plans) accounts.push(...(await seedTeam(db, plan, now)));
    return accounts;
  });
}

async function seedTeam(db: Transaction, { team, themes, cases, runs, seed }: (typeof plans)[number], now: Date): Promise<DemonstrationAccount[]> {
  const teamId = randomUUID();
  const until = now;
  const from = new Date(now.getTime() - 400 * 86_400_000);
  await db.insert(organization).values({ id: teamId, name: team.name, slug: team.slug, createdAt: from, metadata: JSON.stringify({ demonstration: true }) });
  const { people, accounts } = await seedPeople(db, team, teamId, from);
  const owner = people.find((person) => person.role === "owner") ?? null;
  await db.insert(teamCounter).values({ teamId, nextCase: cases + 1, nextEdition: 2 });
  await db.insert(edition).values({ teamId, number: 1, rules: firstEdition, note: "The rules every team begins with.", origin: "first", publishedAt: from });
  const machines = await seedMachines(db, team, teamId, owner, from);
  const plan: DemonstrationPlan = { themes, machines, cases, runs, seed, from, until };
  await seedCases(db, teamId, await demonstrationCases(plan), people.filter((person) => person.role !== "observer"));
  await db.insert(audit).values({ teamId, actorId: null, action: "team.seeded", subjectKind: "team", subjectId: teamId, detail: { demonstration: true }, at: from });
  return accounts;
}

async function seedPeople(db: Transaction, team: DemonstrationTeam, teamId: string, createdAt: Date): Promise<{ people: Person[]; accounts: DemonstrationAccount[] }> {
  const people: Person[] = [];
  const accounts: DemonstrationAccount[] = [];
  for (const { name, mailbox, role } of team.people) {
    const id = randomUUID();
    const email = `${mailbox}@${team.slug}.example`;
    const password = randomBytes(18).toString("base64url");
    await db.insert(user).values({ id, name, email, emailVerified: true, createdAt });
    await db.insert(account).values({ id: randomUUID(), accountId: id, providerId: "credential", userId: id, password: await hashPassword(password), createdAt, updatedAt: createdAt });
    await db.insert(member).values({ id: randomUUID(), organizationId: teamId, userId: id, role, createdAt });
    people.push({ id, role });
    accounts.push({ email, password, role, team: team.name });
  }
  return { people, accounts };
}

async function seedMachines(db: Transaction, team: DemonstrationTeam, teamId: string, owner: Person | null, createdAt: Date): Promise<SavedMachine[]> {
  const sheets = team.machines.map((sheet) => ({ ...sheet, id: randomUUID() }));
  await db.insert(machine).values(sheets.map((sheet) => ({ ...sheet, teamId, demonstration: true, createdBy: owner?.id ?? null, createdAt })));
  return sheets;
}

async function seedCases(db: Transaction, teamId: string, cases: readonly DemonstrationCase[], writers: readonly Person[]): Promise<void> {
  const ids = new Map(cases.map((one) => [`case-${one.number}`, randomUUID()]));
  for (const one of cases) {
    const id = ids.get(`case-${one.number}`) ?? randomUUID();
    const authorId = writers[one.number % writers.length]?.id ?? null;
    const adviceId = randomUUID();
    const content = withRealIds(one.advice, ids);
    const { answers } = one;
    await db.insert(solverCase).values({
      id,
      teamId,
      number: one.number,
      title: one.title,
      questionnaire: one.questionnaire,
      answers,
      discretisation: answers.discretisation,
      degree: answers.degree,
      meshFamily: answers.meshFamily,
      contrastRatio: answers.contrast.ratio,
      unknowns: content.sizes.unknowns,
      cores: answers.hardware.cores,
      machineId: one.machineId,
      demonstration: true,
      authorId,
      createdAt: one.createdAt,
    });
    await db.insert(advice).values({
      id: adviceId,
      teamId,
      caseId: id,
      sequence: 1,
      editionNumber: content.edition.number,
      modelVersion: content.modelVersion,
      firstStrategy: content.ranking.find((entry) => entry.status === "ranked")?.strategy ?? null,
      firedRules: content.firedRules,
      content,
      createdBy: authorId,
      createdAt: one.createdAt,
    });
    if (one.runs.length > 0) await db.insert(run).values(one.runs.map((entry) => runRow(entry, { teamId, caseId: id, adviceId, authorId, cores: answers.hardware.cores })));
  }
}

function runRow({ run: simulated, measuredAt, recordedAt }: DemonstrationCase["runs"][number], keys: { teamId: string; caseId: string; adviceId: string; authorId: string | null; cores: number }) {
  return { ...simulated, ...keys, parameters: {}, followedAdvice: null, source: "demonstration" as const, measuredAt, recordedAt };
}

function withRealIds(given: Advice, ids: ReadonlyMap<string, string>): Advice {
  return { ...given, nearestCases: given.nearestCases.map((near) => ({ ...near, id: ids.get(near.id) ?? near.id })) };
}
