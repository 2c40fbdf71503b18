import { countOtherCurators, findDraft, type DraftRow, type DraftSummaryRow } from "@/db/queries/drafts";
import { findRules, liveEditionNumber } from "@/db/queries/editions";
import type { TeamDatabase } from "@/db/scope";
import type { DraftSummary, DraftView } from "@/lib/api/contract/drafts";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import type { Scope } from "@/lib/auth/guard";
import { mayRole } from "@/lib/auth/permissions";
import { AppError } from "@/lib/shared/app-error";
import { personView } from "@/lib/use-cases/shared/views";
import type { RuleSet } from "@/rules/rule-schema";
import { validateRuleSet } from "@/rules/validate-rule-set";
import { differencesInWords } from "./differences";

export function draftSummary(row: DraftSummaryRow): DraftSummary {
  return {
    id: row.id,
    title: row.title,
    basedOn: row.basedOn,
    version: row.version,
    status: row.status,
    origin: row.origin,
    note: row.note,
    rules: row.ruleCount,
    createdBy: personView(row.createdBy, row.creatorName),
    createdAt: row.createdAt.toISOString(),
    updatedBy: personView(row.updatedBy, row.editorName),
    updatedAt: row.updatedAt.toISOString(),
    submittedBy: personView(row.submittedBy, row.submitterName),
    submittedAt: row.submittedAt?.toISOString() ?? null,
    publishedAs: row.publishedAs,
  };
}

/** A draft as it is sent: its problems, its difference from the live edition, and what the asker may do about it. */
export async function readDraft(db: TeamDatabase, scope: Scope, id: string): Promise<DraftView> {
  const row = await findDraft(db, scope, id);
  if (row === null) throw draftNotFound();
  const live = await readLive(db, scope);
  return {
    ...draftSummary(row),
    rules: row.rules,
    problems: validateRuleSet(row.rules, parameterCatalogue),
    live: live.number,
    differences: differencesInWords(live.rules, row.rules),
    approval: await approvalOf(db, scope, row),
  };
}

export async function readLive(db: TeamDatabase, scope: Scope): Promise<{ number: number; rules: RuleSet }> {
  const number = await liveEditionNumber(db, scope);
  const rules = number === null ? null : await findRules(db, scope, number);
  if (number === null || rules === null) throw new AppError("unavailable", "This team's first rulebook is being prepared; try again in a minute.");
  return { number, rules };
}

/** Somebody else than the submitter approves, unless there is nobody else who may edit the rulebook. */
export async function approvalOf(db: TeamDatabase, scope: Scope, row: Pick<DraftRow, "status" | "submittedBy">): Promise<DraftView["approval"]> {
  if (row.status !== "submitted" || !mayRole(scope.role, "rulebook:edit")) return "no";
  if (row.submittedBy !== scope.userId) return "approve";
  return (await countOtherCurators(db, scope, scope.userId)) === 0 ? "alone" : "another";
}

/** The same answer for a draft that is not there and for one of another team. */
export function draftNotFound(): AppError {
  return new AppError("not-found", "This team has no such draft.");
}
