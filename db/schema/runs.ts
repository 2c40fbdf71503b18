import { sql } from "drizzle-orm";
import { bigint, boolean, check, doublePrecision, foreignKey, index, integer, jsonb, pgTable, primaryKey, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import { outcomes } from "@/lib/runs/run";
import { organization, user } from "./auth";
import { advice, solverCase } from "./cases";
import { teamPolicy } from "./roles";

export const runSources = ["form", "api", "log", "import", "bench-pack", "demonstration"] as const;

const list = (values: readonly string[]) => sql.raw(values.map((value) => `'${value}'`).join(", "));

/** One measured solve. Corrected in place with the former values kept in run_revision; withdrawn, never deleted. */
export const run = pgTable(
  "run",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull(),
    caseId: uuid("case_id").notNull(),
    /** The latest advice before the run. */
    adviceId: uuid("advice_id"),
    strategy: text("strategy").notNull(),
    strategyName: text("strategy_name"),
    outcome: text("outcome", { enum: outcomes }).notNull(),
    reason: text("reason"),
    iterations: bigint("iterations", { mode: "number" }),
    setupSeconds: doublePrecision("setup_seconds"),
    solveSeconds: doublePrecision("solve_seconds"),
    peakMemoryGiB: doublePrecision("peak_memory_gib"),
    cores: integer("cores").notNull(),
    trueRelativeResidual: doublePrecision("true_relative_residual"),
    monitoredRelativeResidual: doublePrecision("monitored_relative_residual"),
    monitoredNorm: text("monitored_norm"),
    /** L2 errors against a known solution, where there is one; for observed orders of convergence. */
    velocityError: doublePrecision("velocity_error"),
    pressureError: doublePrecision("pressure_error"),
    parameters: jsonb("parameters").$type<Record<string, number | string>>().notNull().default({}),
    followedAdvice: boolean("followed_advice"),
    note: text("note").notNull().default(""),
    source: text("source", { enum: runSources }).notNull(),
    measuredAt: timestamp("measured_at", { withTimezone: true }).notNull(),
    recordedAt: timestamp("recorded_at", { withTimezone: true }).notNull().defaultNow(),
    authorId: text("author_id").references(() => user.id, { onDelete: "set null" }),
    revision: integer("revision").notNull().default(1),
    withdrawnAt: timestamp("withdrawn_at", { withTimezone: true }),
    withdrawnBy: text("withdrawn_by").references(() => user.id, { onDelete: "set null" }),
    withdrawnReason: text("withdrawn_reason"),
  },
  (table) => [
    foreignKey({ columns: [table.teamId, table.caseId], foreignColumns: [solverCase.teamId, solverCase.id] }).onDelete("cascade"),
    foreignKey({ columns: [table.teamId, table.adviceId], foreignColumns: [advice.teamId, advice.id] }),
    unique("run_team_id").on(table.teamId, table.id),
    index("run_team_case").on(table.teamId, table.caseId, table.measuredAt, table.id),
    check("run_source_known", sql`${table.source} in (${list(runSources)})`),
    check("run_outcome_known", sql`${table.outcome} in (${list(outcomes)})`),
    teamPolicy("run"),
  ],
);

/** What a run said before a correction. */
export const runRevision = pgTable(
  "run_revision",
  {
    teamId: text("team_id").notNull(),
    runId: uuid("run_id").notNull(),
    revision: integer("revision").notNull(),
    before: jsonb("before").$type<Record<string, unknown>>().notNull(),
    changedBy: text("changed_by").references(() => user.id, { onDelete: "set null" }),
    changedAt: timestamp("changed_at", { withTimezone: true }).notNull().defaultNow(),
    explanation: text("explanation").notNull().default(""),
  },
  (table) => [
    primaryKey({ columns: [table.runId, table.revision] }),
    foreignKey({ columns: [table.teamId, table.runId], foreignColumns: [run.teamId, run.id] }).onDelete("cascade"),
    teamPolicy("run_revision"),
  ],
);

/** Answers already given under an Idempotency-Key; `bodyHash` is SHA-256 of method, path and body. */
export const idempotencyKey = pgTable(
  "idempotency_key",
  {
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    key: text("key").notNull(),
    bodyHash: text("body_hash").notNull(),
    response: jsonb("response").$type<unknown>(),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.teamId, table.key] }), index("idempotency_key_created").on(table.createdAt), teamPolicy("idempotency_key")],
);
