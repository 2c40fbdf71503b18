import { sql } from "drizzle-orm";
import { boolean, check, doublePrecision, foreignKey, index, integer, jsonb, pgTable, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import type { RuleSet } from "@/rules/rule-schema";
import { organization, user } from "./auth";
import { teamPolicy } from "./roles";

export const draftStatuses = ["open", "submitted", "published", "discarded"] as const;
export const jobStatuses = ["queued", "running", "done", "failed", "cancelled"] as const;

const list = (values: readonly string[]) => sql.raw(values.map((value) => `'${value}'`).join(", "));
const instant = (name: string) => timestamp(name, { withTimezone: true });

/** An edition in the making. `version` rises with every save, so that two editors can't overwrite each other unknowingly. */
export const draft = pgTable(
  "draft",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    title: text("title").notNull(),
    basedOn: integer("based_on").notNull(),
    rules: jsonb("rules").$type<RuleSet>().notNull(),
    version: integer("version").notNull().default(1),
    status: text("status", { enum: draftStatuses }).notNull().default("open"),
    /** "live", "import", "proposal:<key>" or "rollback:<number>". */
    origin: text("origin").notNull(),
    note: text("note").notNull().default(""),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedBy: text("updated_by").references(() => user.id, { onDelete: "set null" }),
    updatedAt: instant("updated_at").notNull().defaultNow(),
    submittedBy: text("submitted_by").references(() => user.id, { onDelete: "set null" }),
    submittedAt: instant("submitted_at"),
    publishedAs: integer("published_as"),
  },
  (table) => [
    unique("draft_team_id").on(table.teamId, table.id),
    index("draft_team_updated").on(table.teamId, table.updatedAt),
    check("draft_status_known", sql`${table.status} in (${list(draftStatuses)})`),
    teamPolicy("draft"),
  ],
);

/** A draft against the live edition over the team's record; made in the worker, kept with the draft. */
export const replay = pgTable(
  "replay",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull(),
    draftId: uuid("draft_id").notNull(),
    draftVersion: integer("draft_version").notNull(),
    editionNumber: integer("edition_number").notNull(),
    status: text("status", { enum: jobStatuses }).notNull().default("queued"),
    /** Share done, 0 to 1. */
    progress: doublePrecision("progress").notNull().default(0),
    result: jsonb("result").$type<unknown>(),
    failure: text("failure"),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
    finishedAt: instant("finished_at"),
  },
  (table) => [
    foreignKey({ columns: [table.teamId, table.draftId], foreignColumns: [draft.teamId, draft.id] }).onDelete("cascade"),
    index("replay_team_draft").on(table.teamId, table.draftId, table.createdAt),
    check("replay_status_known", sql`${table.status} in (${list(jobStatuses)})`),
    teamPolicy("replay"),
  ],
);

/** One search of the record for refinements, with what it found or why it proposes nothing. */
export const proposalSearch = pgTable(
  "proposal_search",
  {
    id: uuid("id").primaryKey().defaultRandom(),
    teamId: text("team_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    editionNumber: integer("edition_number").notNull(),
    status: text("status", { enum: jobStatuses }).notNull().default("queued"),
    progress: doublePrecision("progress").notNull().default(0),
    result: jsonb("result").$type<unknown>(),
    failure: text("failure"),
    createdBy: text("created_by").references(() => user.id, { onDelete: "set null" }),
    createdAt: instant("created_at").notNull().defaultNow(),
    finishedAt: instant("finished_at"),
    automatic: boolean("automatic").notNull().default(false),
  },
  (table) => [index("proposal_search_team").on(table.teamId, table.createdAt), check("proposal_search_status_known", sql`${table.status} in (${list(jobStatuses)})`), teamPolicy("proposal_search")],
);
