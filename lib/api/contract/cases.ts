import { z } from "zod";
import { adviceSchema } from "@/lib/advice/advice";
import { drillDownSchema } from "@/lib/hit-rates/filter";
import { discretisations, meshFamilies } from "@/lib/questionnaire/answer-sets";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { strategyIds, strategyIdSchema } from "@/lib/shared/strategy-ids";
import { defineOperation } from "../operation";
import { caseParams, caseRefSchema, instantSchema, listOf, pageShape, personSchema, wholeQuery } from "./common";
import { runSchema } from "./runs";

/** no-run: nothing recorded (or all withdrawn); run: recorded, but not by the advised strategy on the case's cores; else as judged. */
export const caseStatuses = ["no-run", "run", "worked", "missed"] as const;
export type CaseStatus = (typeof caseStatuses)[number];

export const caseSorts = ["-number", "number", "title", "-title", "unknowns", "-unknowns", "degree", "-degree"] as const;
export type CaseSort = (typeof caseSorts)[number];

/** Filters and sort as they stand in the address of /cases; the hit rates' own filter among them. */
const caseFilterShape = {
  ...drillDownSchema.shape,
  degree: wholeQuery(1, 6).optional(),
  edition: wholeQuery(1, 999_999_999).optional(),
  q: z.string().trim().max(120).optional(),
  /** First strategy of the latest advice. */
  strategy: strategyIdSchema.optional(),
  status: z.enum(caseStatuses).optional(),
  author: z.string().min(1).max(100).optional(),
};
export const caseFilterQuery = z.strictObject({ ...caseFilterShape, sort: z.enum(caseSorts).default("-number") });
export const caseListQuery = caseFilterQuery.extend(pageShape);
export type CaseFilter = z.output<typeof caseFilterQuery>;
export type CaseListQuery = z.output<typeof caseListQuery>;

export const caseSummarySchema = z.object({
  id: z.string(),
  number: z.int(),
  title: z.string(),
  discretisation: z.enum(discretisations),
  degree: z.int(),
  meshFamily: z.enum(meshFamilies),
  contrastRatio: z.number(),
  unknowns: z.number(),
  cores: z.int(),
  /** First strategy and edition of the latest advice. */
  firstStrategy: z.enum(strategyIds).nullable(),
  edition: z.int(),
  status: z.enum(caseStatuses),
  runs: z.int(),
  author: personSchema,
  demonstration: z.boolean(),
  createdAt: instantSchema,
  /** When a run was last recorded, else when the case was made. */
  activeAt: instantSchema,
});
export type CaseSummary = z.infer<typeof caseSummarySchema>;

export const givenAdviceSchema = z.object({
  id: z.string(),
  sequence: z.int(),
  edition: z.int(),
  modelVersion: z.string(),
  firstStrategy: z.enum(strategyIds).nullable(),
  givenBy: personSchema,
  givenAt: instantSchema,
});
export type GivenAdvice = z.infer<typeof givenAdviceSchema>;

/** What two pieces of advice on the same case say differently, a sentence each. */
export const adviceChangesSchema = z.array(z.string());

export const caseDetailSchema = caseSummarySchema.extend({
  questionnaire: questionnaireSchema,
  machine: z.object({ id: z.string().nullable(), name: z.string().nullable() }),
  limits: z.object({ tolerance: z.number(), repeatedSolves: z.int(), timeLimitSeconds: z.number().nullable(), memoryGiB: z.number(), cores: z.int() }),
  advice: adviceSchema,
  /** Which of `adviceGiven` stands in `advice`: the latest. */
  adviceId: z.string(),
  adviceGiven: z.array(givenAdviceSchema),
  /** What the latest advice says differently from the one before it. */
  adviceChanges: adviceChangesSchema,
  /** Runs of the case as they were measured, withdrawn ones marked; the first 200. */
  runList: z.array(runSchema),
});
export type CaseDetail = z.infer<typeof caseDetailSchema>;

const strategyFileParams = z.strictObject({ id: caseRefSchema, strategy: strategyIdSchema });

/** All that somebody needs to run one strategy: options or the reason why there are none, the recipe in prose, the batch script. */
export const strategyFilesSchema = z.object({
  options: z.discriminatedUnion("kind", [
    z.object({ kind: z.literal("petsc"), filename: z.string(), text: z.string(), callingLines: z.string().nullable() }),
    z.object({ kind: z.literal("recipe-only"), reason: z.string() }),
  ]),
  recipe: z.array(z.string()),
  batchScript: z.object({ filename: z.string(), text: z.string() }),
});
export type StrategyFiles = z.infer<typeof strategyFilesSchema>;

export const curveAxes = ["cores", "unknowns"] as const;
export type CurveAxis = (typeof curveAxes)[number];

const curvePointSchema = z.object({ x: z.number(), low: z.number(), median: z.number(), high: z.number() });

/** Predicted total seconds of the leading strategies, before rules and evidence, against cores or unknowns. */
export const scalingCurvesSchema = z.object({
  over: z.enum(curveAxes),
  curves: z.array(z.object({ strategy: strategyIdSchema, points: z.array(curvePointSchema) })),
  crossings: z.array(z.object({ x: z.number(), seconds: z.number(), faster: strategyIdSchema, slower: strategyIdSchema })),
});
export type ScalingCurves = z.infer<typeof scalingCurvesSchema>;

export const caseOperations = {
  createCase: defineOperation({
    id: "createCase",
    method: "POST",
    path: "/api/v1/cases",
    tag: "Cases",
    summary: "Save a case with its advice, frozen as given",
    permission: "cases:write",
    body: { kind: "json", schema: z.strictObject({ questionnaire: questionnaireSchema }) },
    status: 201,
    response: { kind: "json", schema: z.object({ id: z.string(), number: z.int(), advice: adviceSchema }) },
    idempotent: true,
  }),
  listCases: defineOperation({
    id: "listCases",
    method: "GET",
    path: "/api/v1/cases",
    tag: "Cases",
    summary: "Cases of the team, filtered and sorted",
    permission: "cases:read",
    query: caseListQuery,
    response: { kind: "json", schema: listOf(caseSummarySchema) },
  }),
  getCase: defineOperation({
    id: "getCase",
    method: "GET",
    path: "/api/v1/cases/{id}",
    tag: "Cases",
    summary: "One case with its advice and runs, by UUID or number",
    permission: "cases:read",
    params: caseParams,
    response: { kind: "json", schema: caseDetailSchema },
  }),
  copyCase: defineOperation({
    id: "copyCase",
    method: "GET",
    path: "/api/v1/cases/{id}/questionnaire",
    tag: "Cases",
    summary: "The answers of a case, ready to be sent as a new one",
    permission: "cases:read",
    params: caseParams,
    response: { kind: "json", schema: questionnaireSchema },
  }),
  adviseAgain: defineOperation({
    id: "adviseAgain",
    method: "POST",
    path: "/api/v1/cases/{id}/advice",
    tag: "Cases",
    summary: "New advice on a case under the live edition and the present record, with what changed",
    permission: "cases:write",
    params: caseParams,
    status: 201,
    response: { kind: "json", schema: z.object({ adviceId: z.string(), sequence: z.int(), advice: adviceSchema, changes: adviceChangesSchema }) },
    idempotent: true,
  }),
  optionsFile: defineOperation({
    id: "optionsFile",
    method: "GET",
    path: "/api/v1/cases/{id}/options/{strategy}",
    tag: "Cases",
    summary: "Solver options of one strategy for the case, or the recipe where options can't express it",
    permission: "cases:read",
    params: strategyFileParams,
    response: { kind: "other", mediaTypes: ["text/plain"], description: "The options file" },
  }),
  batchScript: defineOperation({
    id: "batchScript",
    method: "GET",
    path: "/api/v1/cases/{id}/batch-script/{strategy}",
    tag: "Cases",
    summary: "A batch script that runs one strategy on the case's hardware and reports back",
    permission: "cases:read",
    params: strategyFileParams,
    response: { kind: "other", mediaTypes: ["text/x-shellscript"], description: "The batch script" },
  }),
  strategyFiles: defineOperation({
    id: "strategyFiles",
    method: "GET",
    path: "/api/v1/cases/{id}/strategies/{strategy}",
    tag: "Cases",
    summary: "Options, recipe and batch script of one strategy for the case, together",
    permission: "cases:read",
    params: strategyFileParams,
    response: { kind: "json", schema: strategyFilesSchema },
  }),
  scalingCurves: defineOperation({
    id: "scalingCurves",
    method: "GET",
    path: "/api/v1/cases/{id}/curves",
    tag: "Cases",
    summary: "Predicted time of the leading strategies against cores or unknowns, with the points where they cross",
    permission: "cases:read",
    params: caseParams,
    query: z.strictObject({ over: z.enum(curveAxes).default("cores") }),
    response: { kind: "json", schema: scalingCurvesSchema },
  }),
  exportCases: defineOperation({
    id: "exportCases",
    method: "GET",
    path: "/api/v1/cases/export.csv",
    tag: "Cases",
    summary: "The filtered cases as CSV",
    permission: "cases:read",
    query: caseFilterQuery,
    response: { kind: "other", mediaTypes: ["text/csv"], description: "One line a case" },
  }),
};
