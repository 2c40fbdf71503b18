import { sql } from "drizzle-orm";
import { bigint, boolean, check, foreignKey, index, integer, jsonb, pgTable, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import { organization, user } from "./auth";
import { solverCase } from "./cases";
import { teamPolicy } from "./roles";
import { run } from "./runs";

export const deliveryStatuses = ["waiting", "delivered", "given-up"] as const;

const list = (values: readonly string[]) => sql.raw(values.map((value) => `'${value}'`).join(", "));
const instant = (name: string) => timestamp(name, { withTimezone: true });

/** What was read from a solver's log: the parsed values with their lines and the residual history, not the log itself. */
export const runLog = pgTable(
  "run_log",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull(),
    caseId: uuid("case_id").notNull(),
    runId: uuid("run_id"),
    fileName: text("file_name").notNull().default(""),
    bytes: bigint("bytes", { mode: "number" }).notNull(),
    sha256: text("sha256").notNull(),
    parsed: jsonb("parsed").$type<unknown>().notNull(),
    findings: jsonb("findings").$type<unknown>().notNull().default([]),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
  },
  (table) => [
    foreignKey({ columns: [table.teamId, table.caseId], foreignColumns: [solverCase.teamId, solverCase.id] }).onDelete("cascade"),
    foreignKey({ columns: [table.teamId, table.runId], foreignColumns: [run.teamId, run.id] }).onDelete("cascade"),
    index("run_log_team_run").on(table.teamId, table.runId),
    index("run_log_team_case").on(table.teamId, table.caseId),
    teamPolicy("run_log"),
  ],
);

/** A team's own log format: a safe pattern or a column per quantity. */
export const logMapping = pgTable(
  "log_mapping",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    mapping: jsonb("mapping").$type<unknown>().notNull(),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
  },
  (table) => [unique("log_mapping_team_name").on(table.teamId, table.name), teamPolicy("log_mapping")],
);

/** Where to tell when a run is recorded or an edition published; bodies are signed with `secret`. */
export const webhook = pgTable(
  "webhook",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    url: text("url").notNull(),
    secret: text("secret").notNull(),
    events: text("events").array().notNull(),
    enabled: boolean("enabled").notNull().default(true),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
  },
  (table) => [unique("webhook_team_id").on(table.teamId, table.id), teamPolicy("webhook")],
);

export const webhookDelivery = pgTable(
  "webhook_delivery",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull(),
    webhookId: uuid("webhook_id").notNull(),
    event: text("event").notNull(),
    payload: jsonb("payload").$type<unknown>().notNull(),
    status: text("status", { enum: deliveryStatuses }).notNull().default("waiting"),
    attempts: integer("attempts").notNull().default(0),
    lastAnswer: text("last_answer"),
    createdAt: instant("created_at").notNull().defaultNow(),
    deliveredAt: instant("delivered_at"),
  },
  (table) => [
    foreignKey({ columns: [table.teamId, table.webhookId], foreignColumns: [webhook.teamId, webhook.id] }).onDelete("cascade"),
    index("webhook_delivery_team").on(table.teamId, table.createdAt),
    check("webhook_delivery_status_known", sql`${table.status} in (${list(deliveryStatuses)})`),
    teamPolicy("webhook_delivery"),
  ],
);
