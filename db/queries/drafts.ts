import { and, count, desc, eq, inArray, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/pg-core";
import type { Scope } from "@/lib/auth/guard";
import type { RuleSet } from "@/rules/rule-schema";
import { member, user } from "../schema/auth";
import { draft, type draftStatuses } from "../schema/drafts";
import type { TeamDatabase } from "../scope";

export type DraftStatus = (typeof draftStatuses)[number];

const creator = alias(user, "creator");
const editor = alias(user, "editor");
const submitter = alias(user, "submitter");

const summary = {
  id: draft.id,
  title: draft.title,
  basedOn: draft.basedOn,
  version: draft.version,
  status: draft.status,
  origin: draft.origin,
  note: draft.note,
  ruleCount: sql<number>`jsonb_array_length(${draft.rules})`,
  createdBy: draft.createdBy,
  creatorName: creator.name,
  createdAt: draft.createdAt,
  updatedBy: draft.updatedBy,
  editorName: editor.name,
  updatedAt: draft.updatedAt,
  updatedKey: sql<string>`to_char(${draft.updatedAt} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
  submittedBy: draft.submittedBy,
  submitterName: submitter.name,
  submittedAt: draft.submittedAt,
  publishedAs: draft.publishedAs,
};
export type DraftSummaryRow = Awaited<ReturnType<typeof listDrafts>>[number];
export type DraftRow = DraftSummaryRow & { rules: RuleSet };

type Place = { updatedKey: string; id: string };

/** The one changed last first; equal times by id. */
export async function listDrafts(db: TeamDatabase, scope: Scope, params: { statuses: readonly DraftStatus[]; after: Place | null; limit: number }) {
  const { after, statuses } = params;
  const beyond = after === null ? undefined : sql`(${draft.updatedAt}, ${draft.id}) < (${after.updatedKey}::timestamptz, ${after.id}::uuid)`;
  return db
    .select(summary)
    .from(draft)
    .leftJoin(creator, eq(creator.id, draft.createdBy))
    .leftJoin(editor, eq(editor.id, draft.updatedBy))
    .leftJoin(submitter, eq(submitter.id, draft.submittedBy))
    .where(and(eq(draft.teamId, scope.teamId), inArray(draft.status, [...statuses]), beyond))
    .orderBy(desc(draft.updatedAt), desc(draft.id))
    .limit(params.limit);
}

export async function findDraft(db: TeamDatabase, scope: Scope, id: string): Promise<DraftRow | null> {
  const rows = await db
    .select({ ...summary, rules: draft.rules })
    .from(draft)
    .leftJoin(creator, eq(creator.id, draft.createdBy))
    .leftJoin(editor, eq(editor.id, draft.updatedBy))
    .leftJoin(submitter, eq(submitter.id, draft.submittedBy))
    .where(ofTeam(scope, id));
  return rows[0] ?? null;
}

/** The draft is nobody else's to change until the transaction ends. False when there is none. */
export async function lockDraft(db: TeamDatabase, scope: Scope, id: string): Promise<boolean> {
  const rows = await db.select({ id: draft.id }).from(draft).where(ofTeam(scope, id)).for("update");
  return rows.length === 1;
}

export type NewDraft = { title: string; basedOn: number; rules: RuleSet; origin: string };

export async function insertDraft(db: TeamDatabase, scope: Scope, params: NewDraft): Promise<string> {
  const [row] = await db
    .insert(draft)
    .values({ ...params, teamId: scope.teamId, createdBy: scope.userId, updatedBy: scope.userId })
    .returning({ id: draft.id });
  if (!row) throw new Error("The draft was not stored.");
  return row.id;
}

/** Saves contents as the next version. */
export async function saveDraft(db: TeamDatabase, scope: Scope, params: { id: string; changes: { title?: string; rules?: RuleSet } }): Promise<void> {
  await db
    .update(draft)
    .set({ ...params.changes, version: sql`${draft.version} + 1`, updatedBy: scope.userId, updatedAt: sql`now()` })
    .where(ofTeam(scope, params.id));
}

type Step =
  | { status: "submitted"; note: string }
  | { status: "open" }
  | { status: "discarded" }
  | { status: "published"; publishedAs: number };

/** Moves a draft on; who submitted it and when is kept from its submission until it is opened again. */
export async function moveDraft(db: TeamDatabase, scope: Scope, { id, step }: { id: string; step: Step }): Promise<void> {
  const submission =
    step.status === "submitted" ? { note: step.note, submittedBy: scope.userId, submittedAt: sql`now()` } : step.status === "open" ? { submittedBy: null, submittedAt: null } : {};
  const published = step.status === "published" ? { publishedAs: step.publishedAs } : {};
  await db
    .update(draft)
    .set({ status: step.status, ...submission, ...published, updatedAt: sql`now()` })
    .where(ofTeam(scope, id));
}

/** Members who may edit the rulebook, besides one. */
export async function countOtherCurators(db: TeamDatabase, scope: Scope, exceptUserId: string): Promise<number> {
  const rows = await db
    .select({ n: count() })
    .from(member)
    .where(and(eq(member.organizationId, scope.teamId), inArray(member.role, ["owner", "curator"]), sql`${member.userId} <> ${exceptUserId}`));
  return rows[0]?.n ?? 0;
}

function ofTeam(scope: Scope, id: string) {
  return and(eq(draft.teamId, scope.teamId), eq(draft.id, id));
}
