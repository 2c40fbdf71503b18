import { sql } from "drizzle-orm";
import { boolean, check, doublePrecision, foreignKey, index, integer, jsonb, pgTable, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import type { Advice } from "@/lib/advice/advice";
import type { Answers } from "@/lib/questionnaire/answers";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { organization, user } from "./auth";
import { teamPolicy } from "./roles";

/** Next numbers of a team's cases and editions; its row is locked while a number is taken. */
export const teamCounter = pgTable(
  "team_counter",
  {
    teamId: text("team_id").primaryKey().references(() => organization.id, { onDelete: "cascade" }),
    nextCase: integer("next_case").notNull().default(1),
    nextEdition: integer("next_edition").notNull().default(1),
  },
  () => [teamPolicy("team_counter")],
);

export const machine = pgTable(
  "machine",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    coresPerNode: integer("cores_per_node").notNull(),
    nodes: integer("nodes").notNull(),
    memoryPerNodeGiB: doublePrecision("memory_per_node_gib").notNull(),
    bandwidthPerNodeGBps: doublePrecision("bandwidth_per_node_gbps").notNull(),
    gflopsPerCore: doublePrecision("gflops_per_core").notNull(),
    networkLatencyMicroseconds: doublePrecision("network_latency_microseconds").notNull(),
    networkBandwidthGBps: doublePrecision("network_bandwidth_gbps").notNull(),
    demonstration: boolean("demonstration").notNull().default(false),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [unique("machine_team_name").on(table.teamId, table.name), unique("machine_team_id").on(table.teamId, table.id), teamPolicy("machine")],
);

/** One set-up to be solved. The columns beside the questionnaire repeat answers by which cases are filtered and grouped. */
export const solverCase = pgTable(
  "solver_case",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    number: integer("number").notNull(),
    title: text("title").notNull(),
    questionnaire: jsonb("questionnaire").$type<Questionnaire>().notNull(),
    answers: jsonb("answers").$type<Answers>().notNull(),
    discretisation: text("discretisation").notNull(),
    degree: integer("degree").notNull(),
    meshFamily: text("mesh_family").notNull(),
    contrastRatio: doublePrecision("contrast_ratio").notNull(),
    unknowns: doublePrecision("unknowns").notNull(),
    cores: integer("cores").notNull(),
    machineId: uuid("machine_id"),
    demonstration: boolean("demonstration").notNull().default(false),
    /** Name of a scaling or refinement study the case belongs to. */
    series: text("series"),
    /** When its author was reminded that no run was reported, once. */
    remindedAt: timestamp("reminded_at", { withTimezone: true }),
    /** When somebody said that no run was made. */
    noRunAt: timestamp("no_run_at", { withTimezone: true }),
    authorId: text("author_id").references(() => user.id, { onDelete: "set null" }),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [
    unique("solver_case_team_number").on(table.teamId, table.number),
    unique("solver_case_team_id").on(table.teamId, table.id),
    index("solver_case_team_created").on(table.teamId, table.createdAt, table.id),
    check("solver_case_unknowns_positive", sql`${table.unknowns} > 0`),
    teamPolicy("solver_case"),
  ],
);

/** Advice as given: never updated. `sequence` counts the advice of one case from 1. */
export const advice = pgTable(
  "advice",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull(),
    caseId: uuid("case_id").notNull(),
    sequence: integer("sequence").notNull(),
    editionNumber: integer("edition_number").notNull(),
    modelVersion: text("model_version").notNull(),
    firstStrategy: text("first_strategy"),
    firedRules: text("fired_rules").array().notNull(),
    content: jsonb("content").$type<Advice>().notNull(),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [
    foreignKey({ columns: [table.teamId, table.caseId], foreignColumns: [solverCase.teamId, solverCase.id] }).onDelete("cascade"),
    unique("advice_case_sequence").on(table.caseId, table.sequence),
    unique("advice_team_id").on(table.teamId, table.id),
    index("advice_team_case").on(table.teamId, table.caseId, table.createdAt),
    teamPolicy("advice"),
  ],
);
