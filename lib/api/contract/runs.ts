import { z } from "zod";
import { monitoredNorms, outcomes, runReportSchema } from "@/lib/runs/run";
import { runComparisonSchema } from "@/lib/runs/comparison";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { defineOperation } from "../operation";
import { caseParams, idParams, instantSchema, listOf, pageQuery, personSchema } from "./common";
import { findingSchema } from "./findings";

const parametersSchema = z.record(z.string(), z.union([z.number(), z.string()]));

export const runSchema = z.object({
  id: z.string(),
  caseId: z.string(),
  caseNumber: z.int(),
  adviceId: z.string().nullable(),
  strategy: z.enum([...strategyIds, "other"]),
  strategyName: z.string().nullable(),
  outcome: z.enum(outcomes),
  reason: z.string().nullable(),
  iterations: z.int().nullable(),
  setupSeconds: z.number().nullable(),
  solveSeconds: z.number().nullable(),
  peakMemoryGiB: z.number().nullable(),
  cores: z.int(),
  trueRelativeResidual: z.number().nullable(),
  monitoredRelativeResidual: z.number().nullable(),
  monitoredNorm: z.enum(monitoredNorms).nullable(),
  parameters: parametersSchema,
  followedAdvice: z.boolean().nullable(),
  note: z.string(),
  source: z.string(),
  measuredAt: instantSchema,
  recordedAt: instantSchema,
  author: personSchema,
  revision: z.int(),
  withdrawn: z.object({ at: instantSchema, by: personSchema, reason: z.string() }).nullable(),
  comparison: runComparisonSchema,
});
export type RunView = z.infer<typeof runSchema>;

/** What a run said before a correction. */
export const revisionSchema = z.object({
  revision: z.int(),
  before: runReportSchema,
  changedBy: personSchema,
  changedAt: instantSchema,
  explanation: z.string(),
});
export type RevisionView = z.infer<typeof revisionSchema>;

export const runDetailSchema = runSchema.extend({
  revisions: z.array(revisionSchema),
  /** The diagnosis: with the run's log where there is one, against the case's other runs. */
  findings: z.array(findingSchema),
  hasLog: z.boolean(),
});
export type RunDetailView = z.infer<typeof runDetailSchema>;

export const runRecordedSchema = z.object({ id: z.string(), comparison: runComparisonSchema });
export type RunRecorded = z.infer<typeof runRecordedSchema>;

/** Fields to change, null to clear one; `revision`, when given, must be the run's present one. */
export const runCorrectionSchema = z.strictObject({
  ...runReportSchema.shape,
  strategy: runReportSchema.shape.strategy.optional(),
  outcome: runReportSchema.shape.outcome.optional(),
  strategyName: runReportSchema.shape.strategyName.nullable(),
  reason: runReportSchema.shape.reason.nullable(),
  revision: z.int().min(1).optional(),
  explanation: z.string().trim().max(1000).default(""),
});
export type RunCorrection = z.output<typeof runCorrectionSchema>;

export const importResultSchema = z.object({ runs: z.int(), casesCreated: z.int(), runIds: z.array(z.string()) });
export const importMediaTypes = ["text/csv", "application/x-ndjson"] as const;

export const runOperations = {
  recordRun: defineOperation({
    id: "recordRun",
    method: "POST",
    path: "/api/v1/cases/{id}/runs",
    tag: "Runs",
    summary: "Record a measured run of a case",
    permission: "runs:write",
    params: caseParams,
    body: { kind: "json", schema: runReportSchema },
    status: 201,
    response: { kind: "json", schema: runRecordedSchema },
    idempotent: true,
  }),
  listRuns: defineOperation({
    id: "listRuns",
    method: "GET",
    path: "/api/v1/cases/{id}/runs",
    tag: "Runs",
    summary: "Runs of a case in the order in which they were measured, withdrawn ones marked",
    permission: "runs:read",
    params: caseParams,
    query: pageQuery,
    response: { kind: "json", schema: listOf(runSchema) },
  }),
  getRun: defineOperation({
    id: "getRun",
    method: "GET",
    path: "/api/v1/runs/{id}",
    tag: "Runs",
    summary: "One run with its diagnosis and what it said before each correction",
    permission: "runs:read",
    params: idParams,
    response: { kind: "json", schema: runDetailSchema },
  }),
  correctRun: defineOperation({
    id: "correctRun",
    method: "PATCH",
    path: "/api/v1/runs/{id}",
    tag: "Runs",
    summary: "Correct a run; its former values are kept",
    permission: "runs:write",
    params: idParams,
    body: { kind: "json", schema: runCorrectionSchema },
    response: { kind: "json", schema: runDetailSchema },
  }),
  withdrawRun: defineOperation({
    id: "withdrawRun",
    method: "POST",
    path: "/api/v1/runs/{id}/withdraw",
    tag: "Runs",
    summary: "Withdraw a run: it stays on record, marked, and no longer counts",
    permission: "runs:write",
    params: idParams,
    body: { kind: "json", schema: z.strictObject({ reason: z.string().trim().max(1000).default("") }) },
    response: { kind: "json", schema: runDetailSchema },
  }),
  importRuns: defineOperation({
    id: "importRuns",
    method: "POST",
    path: "/api/v1/runs/import",
    tag: "Runs",
    summary: "Import runs, all rows or none; a row is a run with caseId or questionnaire",
    permission: "runs:write",
    body: { kind: "stream", mediaTypes: importMediaTypes, description: "CSV with a header line, or one JSON object a line; at most 32 MiB" },
    status: 201,
    response: { kind: "json", schema: importResultSchema },
    idempotent: true,
  }),
};
