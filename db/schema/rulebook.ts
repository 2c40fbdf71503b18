import { sql } from "drizzle-orm";
import { boolean, integer, index, jsonb, pgPolicy, pgTable, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import type { RuleSet } from "@/rules/rule-schema";
import { organization, user } from "./auth";
import { authRole, currentTeam, teamPolicy } from "./roles";

/** A numbered, immutable set of rules; the highest number is the live one. */
export const edition = pgTable(
  "edition",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    number: integer("number").notNull(),
    rules: jsonb("rules").$type<RuleSet>().notNull(),
    note: text("note").notNull().default(""),
    submittedBy: text("submitted_by").references(() => user.id, { onDelete: "set null" }),
    approvedBy: text("approved_by").references(() => user.id, { onDelete: "set null" }),
    /** Published by the one who wrote it, in a team with a single curator. */
    alone: boolean("alone").notNull().default(false),
    /** How it came to be: "first", "draft", "rollback:<number>". */
    origin: text("origin").notNull(),
    publishedAt: timestamp("published_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [unique("edition_team_number").on(table.teamId, table.number), teamPolicy("edition")],
);

/** Changes of membership happen as better-auth's role, and their audit row belongs to the same transaction: it may add one, not read any. */
function membershipAudit() {
  return pgPolicy("audit_membership", { as: "permissive", for: "insert", to: authRole, withCheck: sql`team_id = ${currentTeam}` });
}

/** Who changed what, when; append-only. */
export const audit = pgTable(
  "audit",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    actorId: text("actor_id").references(() => user.id, { onDelete: "set null" }),
    action: text("action").notNull(),
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id").notNull(),
    detail: jsonb("detail").$type<Record<string, unknown>>().notNull().default({}),
    at: timestamp("at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [index("audit_team_at").on(table.teamId, table.at, table.id), teamPolicy("audit"), membershipAudit()],
);
