import { z } from "zod";
import { proposalResultSchema } from "@/lib/refinement/proposal-schema";
import { replayResultSchema } from "@/lib/refinement/replay-result";
import { ruleRecordSchema } from "@/lib/refinement/rule-record";
import { defineOperation } from "../operation";
import { idParams, instantSchema, personSchema } from "./common";

export const workStatuses = ["queued", "running", "done", "failed", "cancelled"] as const;
export type WorkStatus = (typeof workStatuses)[number];

const work = {
  id: z.string(),
  status: z.enum(workStatuses),
  /** Share done, 0 to 1. */
  progress: z.number(),
  failure: z.string().nullable(),
  createdBy: personSchema,
  createdAt: instantSchema,
  finishedAt: instantSchema.nullable(),
};

export const replaySummarySchema = z.object({
  ...work,
  draftId: z.string(),
  /** The version of the draft that was replayed, and the edition it was compared with. */
  draftVersion: z.int(),
  editionNumber: z.int(),
});
export type ReplaySummary = z.infer<typeof replaySummarySchema>;

export const replaySchema = replaySummarySchema.extend({ result: replayResultSchema.nullable() });
export type ReplayView = z.infer<typeof replaySchema>;

export const searchSummarySchema = z.object({ ...work, editionNumber: z.int() });
export type SearchSummary = z.infer<typeof searchSummarySchema>;

export const searchSchema = searchSummarySchema.extend({ result: proposalResultSchema.nullable() });
export type SearchView = z.infer<typeof searchSchema>;

export const ruleRecordsSchema = z.object({ edition: z.int(), asOf: instantSchema, items: z.array(ruleRecordSchema) });
export type RuleRecordsView = z.infer<typeof ruleRecordsSchema>;

const replayParams = z.strictObject({ id: z.uuid(), replayId: z.uuid() });
const drafts = "/api/v1/rulebook/drafts/{id}" as const;
const proposals = "/api/v1/rulebook/proposals" as const;

export const refinementOperations = {
  startReplay: defineOperation({
    id: "startReplay",
    method: "POST",
    path: `${drafts}/replay`,
    tag: "Rulebook",
    summary: "Replay a draft against the live edition over the team's record, in the background; one under way for the draft is cancelled",
    permission: "rulebook:edit",
    params: idParams,
    status: 201,
    response: { kind: "json", schema: replaySchema },
  }),
  listReplays: defineOperation({
    id: "listReplays",
    method: "GET",
    path: `${drafts}/replays`,
    tag: "Rulebook",
    summary: "Replays of a draft, the newest first, without their results; at most 20",
    permission: "rulebook:read",
    params: idParams,
    response: { kind: "json", schema: z.object({ items: z.array(replaySummarySchema) }) },
  }),
  getReplay: defineOperation({
    id: "getReplay",
    method: "GET",
    path: `${drafts}/replays/{replayId}`,
    tag: "Rulebook",
    summary: "How far a replay is, and its result",
    permission: "rulebook:read",
    params: replayParams,
    response: { kind: "json", schema: replaySchema },
  }),
  cancelReplay: defineOperation({
    id: "cancelReplay",
    method: "POST",
    path: `${drafts}/replays/{replayId}/cancel`,
    tag: "Rulebook",
    summary: "Stop a replay; one that has ended stays as it is",
    permission: "rulebook:edit",
    params: replayParams,
    response: { kind: "json", schema: replaySchema },
  }),
  listRuleRecords: defineOperation({
    id: "listRuleRecords",
    method: "GET",
    path: "/api/v1/rulebook/rule-records",
    tag: "Rulebook",
    summary: "What came of each rule of the live edition: fired, followed, right, wrong, and whether it drifts",
    permission: "rulebook:read",
    response: { kind: "json", schema: ruleRecordsSchema },
  }),
  startSearch: defineOperation({
    id: "startSearch",
    method: "POST",
    path: proposals,
    tag: "Rulebook",
    summary: "Search the record for refinements of the live edition, in the background; answers the search under way where there is one",
    permission: "rulebook:edit",
    response: { kind: "json", schema: searchSchema },
  }),
  listSearches: defineOperation({
    id: "listSearches",
    method: "GET",
    path: proposals,
    tag: "Rulebook",
    summary: "Searches for refinements, the newest first, without their results; at most 20",
    permission: "rulebook:read",
    response: { kind: "json", schema: z.object({ items: z.array(searchSummarySchema) }) },
  }),
  getSearch: defineOperation({
    id: "getSearch",
    method: "GET",
    path: `${proposals}/{id}`,
    tag: "Rulebook",
    summary: "How far a search is, and what it proposes with the evidence",
    permission: "rulebook:read",
    params: idParams,
    response: { kind: "json", schema: searchSchema },
  }),
  cancelSearch: defineOperation({
    id: "cancelSearch",
    method: "POST",
    path: `${proposals}/{id}/cancel`,
    tag: "Rulebook",
    summary: "Stop a search; one that has ended stays as it is",
    permission: "rulebook:edit",
    params: idParams,
    response: { kind: "json", schema: searchSchema },
  }),
};
