import { z } from "zod";
import { logMappingSchema } from "@/lib/logs/mapping";
import { parsedLogSchema } from "@/lib/logs/parsed-log";
import { monitoredNorms, outcomes, runReportSchema } from "@/lib/runs/run";
import { defineOperation } from "../operation";
import { caseParams, idParams, instantSchema, listOf, pageQuery, personSchema, wholeQuery } from "./common";
import { findingSchema } from "./findings";
import { runRecordedSchema } from "./runs";

export const logMediaTypes = ["text/plain", "application/octet-stream"] as const;
/** Of a log, also of what comes out of a gzipped one. */
export const logLimitBytes = 256 * 2 ** 20;
export const mostRunsAtOnce = 500;

const flag = z.enum(["true", "false"], "Say true or false.").transform((text) => text === "true").pipe(z.boolean());

/** A number in an address; empty means "not known", so that a correction can take a value back. */
const numberText = z
  .string()
  .regex(/^([+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d{1,3})?)?$/, "Give a number.")
  .transform((text) => (text === "" ? null : Number(text)))
  .pipe(z.number().nullable());

const normText = z
  .enum([...monitoredNorms, ""])
  .transform((text) => (text === "" ? null : text))
  .pipe(z.enum(monitoredNorms).nullable());

/** Fields of the run report that stand over what the log says. */
const correctionShape = {
  strategy: runReportSchema.shape.strategy.optional(),
  strategyName: z.string().optional(),
  outcome: z.enum(outcomes).optional(),
  reason: z.string().optional(),
  iterations: numberText.optional(),
  setupSeconds: numberText.optional(),
  solveSeconds: numberText.optional(),
  peakMemoryGiB: numberText.optional(),
  cores: numberText.optional(),
  trueRelativeResidual: numberText.optional(),
  monitoredRelativeResidual: numberText.optional(),
  monitoredNorm: normText.optional(),
  followedAdvice: flag.optional(),
  note: z.string().max(4000).optional(),
  measuredAt: runReportSchema.shape.measuredAt,
};

export const logSources = ["log", "bench-pack"] as const;

export const logQuery = z.strictObject({
  /** Absent: a run is recorded when the log and this address together say enough. true insists on it, false never records. */
  record: flag.optional(),
  /** Id or name of one of the team's own log formats. */
  mapping: z.string().min(1).max(80).optional(),
  /** Taken where the log states no outcome: what the job script saw of the program's end. */
  outcomeIfSilent: z.enum(outcomes).optional(),
  /** The same for a log that does not name its number of processes. */
  coresIfSilent: wholeQuery(1, 4_000_000).optional(),
  fileName: z.string().max(200).optional(),
  source: z.enum(logSources).default("log"),
  ...correctionShape,
});
export type LogQuery = z.output<typeof logQuery>;

export const logReadSchema = z.object({ parsed: parsedLogSchema, findings: z.array(findingSchema), runId: z.string().nullable() });
export type LogRead = z.infer<typeof logReadSchema>;

export const runLogSchema = z.object({
  parsed: parsedLogSchema,
  findings: z.array(findingSchema),
  fileName: z.string(),
  bytes: z.number(),
  sha256: z.string(),
  readAt: instantSchema,
});
export type RunLogView = z.infer<typeof runLogSchema>;

export const logMappingViewSchema = z.object({ id: z.string(), ...logMappingSchema.shape, createdBy: personSchema, createdAt: instantSchema });
export type LogMappingView = z.infer<typeof logMappingViewSchema>;

export const logOperations = {
  readLog: defineOperation({
    id: "readLog",
    method: "POST",
    path: "/api/v1/cases/{id}/logs",
    tag: "Logs",
    summary: "Read a solver's text log of a case, and record it as a run (201) when it says enough; else 200 and runId null",
    permission: "runs:write",
    params: caseParams,
    query: logQuery,
    body: { kind: "stream", mediaTypes: logMediaTypes, description: "The log as it is, also gzipped; at most 256 MiB, unpacked too" },
    status: 201,
    response: { kind: "json", schema: logReadSchema },
    idempotent: true,
  }),
  getRunLog: defineOperation({
    id: "getRunLog",
    method: "GET",
    path: "/api/v1/runs/{id}/log",
    tag: "Logs",
    summary: "What was read from a run's log, with the residual history, and the diagnosis of the run",
    permission: "runs:read",
    params: idParams,
    response: { kind: "json", schema: runLogSchema },
  }),
  recordRuns: defineOperation({
    id: "recordRuns",
    method: "POST",
    path: "/api/v1/cases/{id}/runs/batch",
    tag: "Runs",
    summary: "Record several runs of a case, all or none: a job array, a scaling series",
    permission: "runs:write",
    params: caseParams,
    body: { kind: "json", schema: z.array(runReportSchema).min(1, "Send at least one run.").max(mostRunsAtOnce, `Send at most ${mostRunsAtOnce} runs at once.`) },
    status: 201,
    response: { kind: "json", schema: z.object({ items: z.array(runRecordedSchema) }) },
    idempotent: true,
  }),
  listLogMappings: defineOperation({
    id: "listLogMappings",
    method: "GET",
    path: "/api/v1/log-mappings",
    tag: "Logs",
    summary: "The team's own log formats by name",
    permission: "runs:read",
    query: pageQuery,
    response: { kind: "json", schema: listOf(logMappingViewSchema) },
  }),
  createLogMapping: defineOperation({
    id: "createLogMapping",
    method: "POST",
    path: "/api/v1/log-mappings",
    tag: "Logs",
    summary: "Save a log format: a pattern or a column for each quantity",
    permission: "runs:write",
    body: { kind: "json", schema: logMappingSchema },
    status: 201,
    response: { kind: "json", schema: logMappingViewSchema },
  }),
  updateLogMapping: defineOperation({
    id: "updateLogMapping",
    method: "PATCH",
    path: "/api/v1/log-mappings/{id}",
    tag: "Logs",
    summary: "Replace a log format; runs already read keep what was read",
    permission: "runs:write",
    params: idParams,
    body: { kind: "json", schema: logMappingSchema },
    response: { kind: "json", schema: logMappingViewSchema },
  }),
  deleteLogMapping: defineOperation({
    id: "deleteLogMapping",
    method: "DELETE",
    path: "/api/v1/log-mappings/{id}",
    tag: "Logs",
    summary: "Delete a log format",
    permission: "runs:write",
    params: idParams,
    response: { kind: "json", schema: z.object({ id: z.string() }) },
  }),
};
