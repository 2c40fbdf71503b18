import { z } from "zod";
import { ruleDifferenceSchema } from "@/lib/refinement/diff-rule-sets";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";
import { comparisonOperators, ruleSetSchema } from "@/rules/rule-schema";
import { severities } from "@/rules/validate-rule-set";
import { defineOperation } from "../operation";
import { caseRefSchema, idParams, instantSchema, listOf, pageShape, personSchema } from "./common";
import { editionSummarySchema } from "./record";

export const draftStatuses = ["open", "submitted", "published", "discarded"] as const;
export type DraftStatus = (typeof draftStatuses)[number];

const whole = z.int().min(1).max(2 ** 31 - 1);
const title = z.string().trim().min(1, "A draft needs a title.").max(160, "A title has at most 160 characters.");
const rulesInput = z.unknown().describe("Rules in the form of /api/v1/rulebook/edition.schema.json");

export const draftSummarySchema = z.object({
  id: z.string(),
  title: z.string(),
  /** The live edition when it was begun. */
  basedOn: z.int(),
  /** Rises with every save; a save names the one it began from. */
  version: z.int(),
  status: z.enum(draftStatuses),
  /** "live", "import", "proposal:<key>" or "rollback:<number>". */
  origin: z.string(),
  note: z.string(),
  rules: z.int(),
  createdBy: personSchema,
  createdAt: instantSchema,
  updatedBy: personSchema,
  updatedAt: instantSchema,
  submittedBy: personSchema,
  submittedAt: instantSchema.nullable(),
  publishedAs: z.int().nullable(),
});
export type DraftSummary = z.infer<typeof draftSummarySchema>;

export const ruleProblemSchema = z.object({ path: z.string(), message: z.string(), severity: z.enum(severities) });

export const approvalStates = ["approve", "alone", "another", "no"] as const;

export const draftSchema = draftSummarySchema.extend({
  rules: ruleSetSchema,
  /** Beyond the schema; errors forbid to submit. */
  problems: z.array(ruleProblemSchema),
  /** The edition that publishing would replace, and what would change. */
  live: z.int(),
  differences: z.array(ruleDifferenceSchema),
  /** What the asker may do about a submitted draft: approve it, publish it alone as the only curator, wait for another, or nothing. */
  approval: z.enum(approvalStates),
});
export type DraftView = z.infer<typeof draftSchema>;

export const draftOrigins = ["live", "edition", "import", "proposal"] as const;

export const newDraftSchema = z
  .strictObject({
    from: z.enum(draftOrigins),
    title: title.optional(),
    /** With "edition": its number. */
    number: whole.optional(),
    /** With "import": an exported edition. */
    edition: z.unknown().optional(),
    /** With "proposal": the search and the proposal's key in it. */
    search: z.uuid().optional(),
    key: z.string().min(1).max(400).optional(),
  })
  .superRefine((body, context) => {
    const needed = { live: [], edition: ["number"], import: ["edition"], proposal: ["search", "key"] } as const;
    for (const name of needed[body.from]) if (body[name] === undefined) context.addIssue({ code: "custom", path: [name], message: `A draft from ${body.from} needs this.` });
  });

export const draftSaveSchema = z.strictObject({ version: whole, title: title.optional(), rules: rulesInput.optional() });
export const draftSubmitSchema = z.strictObject({ version: whole, note: z.string().trim().min(1, "Say in a sentence what the draft is for.").max(2000) });
export const draftPublishSchema = z.strictObject({
  version: whole,
  /** The live edition whose difference the approver has read. */
  replacing: whole,
});

const factValue = z.union([z.number(), z.string(), z.boolean(), z.array(z.union([z.number(), z.string()]))]);
const truth = z.enum(["false", "unknown", "true"]);

export type TraceView =
  | { kind: "comparison"; fact: string; operator: (typeof comparisonOperators)[number]; value: z.infer<typeof factValue>; factValue: z.infer<typeof factValue> | null; truth: z.infer<typeof truth> }
  | { kind: "all" | "any" | "not"; members: TraceView[]; truth: z.infer<typeof truth> };

const traceSchema: z.ZodType<TraceView> = z.lazy(() =>
  z.union([
    z.object({ kind: z.literal("comparison"), fact: z.string(), operator: z.enum(comparisonOperators), value: factValue, factValue: factValue.nullable(), truth }),
    z.object({ kind: z.enum(["all", "any", "not"]), members: z.array(traceSchema), truth }),
  ]),
);

const firstChoice = z.object({ strategy: strategyIdSchema, relativeTime: z.number(), rules: z.array(z.string()) });

export const trialSchema = z.object({
  case: z.object({ id: z.string(), number: z.int(), title: z.string() }),
  facts: z.record(z.string(), factValue),
  /** Rules switched off are false. */
  rules: z.array(z.object({ rule: z.string(), enabled: z.boolean(), truth, trace: traceSchema })),
  /** Ranked strategies under the rules tried and under the live edition, each relative to its first. */
  ranking: z.array(firstChoice),
  live: z.object({ number: z.int(), ranking: z.array(firstChoice) }),
});
export type TrialView = z.infer<typeof trialSchema>;

const draft = { kind: "json", schema: draftSchema } as const;
const path = "/api/v1/rulebook/drafts" as const;

export const draftOperations = {
  listDrafts: defineOperation({
    id: "listDrafts",
    method: "GET",
    path,
    tag: "Rulebook",
    summary: "Drafts of the next edition, the one changed last first; open and submitted ones unless a status is given",
    permission: "rulebook:read",
    query: z.strictObject({ ...pageShape, status: z.enum(draftStatuses).optional() }),
    response: { kind: "json", schema: listOf(draftSummarySchema) },
  }),
  createDraft: defineOperation({
    id: "createDraft",
    method: "POST",
    path,
    tag: "Rulebook",
    summary: "Start a draft from the live edition, an old one (to roll back), an exported file or a proposal",
    permission: "rulebook:edit",
    body: { kind: "json", schema: newDraftSchema },
    status: 201,
    response: draft,
  }),
  getDraft: defineOperation({
    id: "getDraft",
    method: "GET",
    path: `${path}/{id}`,
    tag: "Rulebook",
    summary: "A draft with its rules, their problems, and what it would change in the live edition",
    permission: "rulebook:read",
    params: idParams,
    response: draft,
  }),
  saveDraft: defineOperation({
    id: "saveDraft",
    method: "PATCH",
    path: `${path}/{id}`,
    tag: "Rulebook",
    summary: "Save a draft; 409 when somebody saved it since the version that the changes began from",
    permission: "rulebook:edit",
    params: idParams,
    body: { kind: "json", schema: draftSaveSchema },
    response: draft,
  }),
  discardDraft: defineOperation({
    id: "discardDraft",
    method: "POST",
    path: `${path}/{id}/discard`,
    tag: "Rulebook",
    summary: "Put a draft away; it can still be read",
    permission: "rulebook:edit",
    params: idParams,
    response: draft,
  }),
  submitDraft: defineOperation({
    id: "submitDraft",
    method: "POST",
    path: `${path}/{id}/submit`,
    tag: "Rulebook",
    summary: "Ask for approval with a note; refused while a rule has an error",
    permission: "rulebook:edit",
    params: idParams,
    body: { kind: "json", schema: draftSubmitSchema },
    response: draft,
  }),
  withdrawDraft: defineOperation({
    id: "withdrawDraft",
    method: "POST",
    path: `${path}/{id}/withdraw`,
    tag: "Rulebook",
    summary: "Take a submission back, so that the draft can be changed again",
    permission: "rulebook:edit",
    params: idParams,
    response: draft,
  }),
  publishDraft: defineOperation({
    id: "publishDraft",
    method: "POST",
    path: `${path}/{id}/publish`,
    tag: "Rulebook",
    summary: "Approve a submitted draft: it becomes the live edition under the next number, and the team is told",
    permission: "rulebook:edit",
    params: idParams,
    body: { kind: "json", schema: draftPublishSchema },
    status: 201,
    response: { kind: "json", schema: editionSummarySchema },
  }),
  tryRules: defineOperation({
    id: "tryRules",
    method: "POST",
    path: "/api/v1/rulebook/try",
    tag: "Rulebook",
    summary: "What rules say about one case: its facts, which conditions hold, and the ranking beside the live edition's; saves nothing",
    permission: "rulebook:read",
    body: { kind: "json", schema: z.strictObject({ case: caseRefSchema, rules: rulesInput }) },
    response: { kind: "json", schema: trialSchema },
  }),
  compareEditions: defineOperation({
    id: "compareEditions",
    method: "GET",
    path: "/api/v1/rulebook/editions/{number}/changes",
    tag: "Rulebook",
    summary: "What an edition changed in the one before it, rule by rule in words",
    permission: "rulebook:read",
    params: z.strictObject({ number: z.string().regex(/^[1-9]\d{0,8}$/) }),
    response: { kind: "json", schema: z.object({ number: z.int(), before: z.int().nullable(), differences: z.array(ruleDifferenceSchema) }) },
  }),
  exportEdition: defineOperation({
    id: "exportEdition",
    method: "GET",
    path: "/api/v1/rulebook/editions/{number}/export",
    tag: "Rulebook",
    summary: "An edition as a file that can be imported as a draft; the number, or \"live\"",
    permission: "rulebook:read",
    params: z.strictObject({ number: z.string().regex(/^([1-9]\d{0,8}|live)$/) }),
    response: { kind: "other", mediaTypes: ["application/json"], description: "An edition in the form of /api/v1/rulebook/edition.schema.json" },
  }),
};
