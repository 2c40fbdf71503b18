import { z } from "zod";
import { hitRateTerms } from "@/lib/hit-rates/definitions";
import { hitRateFilterSchema } from "@/lib/hit-rates/filter";
import { hitRatesSchema } from "@/lib/hit-rates/hit-rates";
import { ruleSetSchema } from "@/rules/rule-schema";
import { defineOperation } from "../operation";
import { instantSchema, listOf, pageQuery, personSchema, wholeQuery } from "./common";

export const hitRatesQuery = hitRateFilterSchema.extend({ degree: wholeQuery(1, 6).optional(), edition: wholeQuery(1, 999_999_999).optional() });

export const hitRatesResponseSchema = hitRatesSchema.extend({
  definitions: z.record(z.enum(hitRateTerms), z.object({ term: z.string(), text: z.string() })),
});
export type HitRatesResponse = z.infer<typeof hitRatesResponseSchema>;

export const editionSummarySchema = z.object({
  number: z.int(),
  live: z.boolean(),
  rules: z.int(),
  note: z.string(),
  /** "first", "draft" or "rollback:<number>". */
  origin: z.string(),
  submittedBy: personSchema,
  approvedBy: personSchema,
  /** Published by the one who submitted it, the team's only curator. */
  alone: z.boolean(),
  publishedAt: instantSchema,
  /** Pieces of advice given under it. */
  advice: z.int(),
});
export type EditionSummary = z.infer<typeof editionSummarySchema>;

const editionSchema = editionSummarySchema.extend({
  rules: ruleSetSchema,
  /** For each rule, in how many pieces of advice under this edition it fired. */
  fired: z.array(z.object({ rule: z.string(), count: z.int() })),
});
export type EditionView = z.infer<typeof editionSchema>;

export const auditEntrySchema = z.object({
  id: z.string(),
  at: instantSchema,
  actor: personSchema,
  action: z.string(),
  subjectKind: z.string(),
  subjectId: z.string(),
  detail: z.record(z.string(), z.unknown()),
});
export type AuditEntry = z.infer<typeof auditEntrySchema>;

export const exportFormats = ["json", "ndjson"] as const;

export const recordOperations = {
  hitRates: defineOperation({
    id: "hitRates",
    method: "GET",
    path: "/api/v1/hit-rates",
    tag: "Hit rates",
    summary: "How often the advice worked and was best, overall and by group, each with the filter that finds its cases",
    permission: "hit-rates:read",
    query: hitRatesQuery,
    response: { kind: "json", schema: hitRatesResponseSchema },
  }),
  listEditions: defineOperation({
    id: "listEditions",
    method: "GET",
    path: "/api/v1/rulebook/editions",
    tag: "Rulebook",
    summary: "Editions of the rulebook, the live one first",
    permission: "rulebook:read",
    query: pageQuery,
    response: { kind: "json", schema: listOf(editionSummarySchema) },
  }),
  getEdition: defineOperation({
    id: "getEdition",
    method: "GET",
    path: "/api/v1/rulebook/editions/{number}",
    tag: "Rulebook",
    summary: "One edition with its rules and how often each fired; the number, or \"live\"",
    permission: "rulebook:read",
    params: z.strictObject({ number: z.string().regex(/^([1-9]\d{0,8}|live)$/) }),
    response: { kind: "json", schema: editionSchema },
  }),
  listAudit: defineOperation({
    id: "listAudit",
    method: "GET",
    path: "/api/v1/audit",
    tag: "Team",
    summary: "Who changed what and when, the newest first",
    permission: "audit:read",
    query: pageQuery,
    response: { kind: "json", schema: listOf(auditEntrySchema) },
  }),
  exportTeam: defineOperation({
    id: "exportTeam",
    method: "GET",
    path: "/api/v1/export",
    tag: "Team",
    summary: "All of the team's data in one file",
    permission: "export:read",
    query: z.strictObject({ format: z.enum(exportFormats).default("json") }),
    response: { kind: "other", mediaTypes: ["application/json", "application/x-ndjson"], description: "One JSON object, or one object a line" },
  }),
};
