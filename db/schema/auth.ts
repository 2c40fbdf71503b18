import { sql, type SQL } from "drizzle-orm";
import { boolean, check, index, integer, pgPolicy, pgTable, text, timestamp, unique } from "drizzle-orm/pg-core";
import { roles } from "@/lib/auth/permissions";
import { appRole, authRole, currentTeam } from "./roles";

// Table and property names are better-auth's; a team is its "organization".

const instant = (name: string) => timestamp(name, { withTimezone: true });
const roleList = sql.raw(roles.map((role) => `'${role}'`).join(", "));

/** better-auth reads and writes every row: it decides who somebody is before any team is known. */
function accountPolicy(table: string) {
  return pgPolicy(`${table}_auth`, { as: "permissive", for: "all", to: authRole, using: sql`true`, withCheck: sql`true` });
}

/** The application only reads, and only what belongs to the present team. */
function memberPolicy(table: string, using: SQL) {
  return pgPolicy(`${table}_team`, { as: "permissive", for: "select", to: appRole, using });
}

export const user = pgTable(
  "user",
  {
    id: text("id").primaryKey(),
    name: text("name").notNull(),
    email: text("email").notNull().unique(),
    emailVerified: boolean("email_verified").notNull().default(false),
    image: text("image"),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
  },
  () => [
    accountPolicy("user"),
    memberPolicy("user", sql`exists (select 1 from "member" m where m.user_id = "user"."id" and m.organization_id = ${currentTeam})`),
  ],
);

export const organization = pgTable(
  "organization",
  {
    id: text("id").primaryKey(),
    name: text("name").notNull(),
    slug: text("slug").notNull().unique(),
    logo: text("logo"),
    createdAt: instant("created_at").notNull().defaultNow(),
    metadata: text("metadata"),
  },
  () => [accountPolicy("organization"), memberPolicy("organization", sql`id = ${currentTeam}`)],
);

export const session = pgTable(
  "session",
  {
    id: text("id").primaryKey(),
    expiresAt: instant("expires_at").notNull(),
    token: text("token").notNull().unique(),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
    ipAddress: text("ip_address"),
    userAgent: text("user_agent"),
    userId: text("user_id").notNull().references(() => user.id, { onDelete: "cascade" }),
    /** The team the cookie acts for. */
    activeOrganizationId: text("active_organization_id").references(() => organization.id, { onDelete: "set null" }),
  },
  (table) => [index("session_user").on(table.userId), accountPolicy("session")],
);

export const account = pgTable(
  "account",
  {
    id: text("id").primaryKey(),
    accountId: text("account_id").notNull(),
    providerId: text("provider_id").notNull(),
    userId: text("user_id").notNull().references(() => user.id, { onDelete: "cascade" }),
    accessToken: text("access_token"),
    refreshToken: text("refresh_token"),
    idToken: text("id_token"),
    accessTokenExpiresAt: instant("access_token_expires_at"),
    refreshTokenExpiresAt: instant("refresh_token_expires_at"),
    scope: text("scope"),
    password: text("password"),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
  },
  (table) => [index("account_user").on(table.userId), accountPolicy("account")],
);

export const verification = pgTable(
  "verification",
  {
    id: text("id").primaryKey(),
    identifier: text("identifier").notNull(),
    value: text("value").notNull(),
    expiresAt: instant("expires_at").notNull(),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
  },
  (table) => [index("verification_identifier").on(table.identifier), accountPolicy("verification")],
);

export const member = pgTable(
  "member",
  {
    id: text("id").primaryKey(),
    organizationId: text("organization_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    userId: text("user_id").notNull().references(() => user.id, { onDelete: "cascade" }),
    role: text("role", { enum: roles }).notNull(),
    createdAt: instant("created_at").notNull().defaultNow(),
  },
  (table) => [
    unique("member_team_user").on(table.organizationId, table.userId),
    index("member_user").on(table.userId),
    check("member_role_known", sql`${table.role} in (${roleList})`),
    accountPolicy("member"),
    memberPolicy("member", sql`organization_id = ${currentTeam}`),
  ],
);

export const invitationStatuses = ["pending", "accepted", "rejected", "canceled"] as const;

export const invitation = pgTable(
  "invitation",
  {
    id: text("id").primaryKey(),
    organizationId: text("organization_id").notNull().references(() => organization.id, { onDelete: "cascade" }),
    email: text("email").notNull(),
    role: text("role", { enum: roles }).notNull(),
    status: text("status", { enum: invitationStatuses }).notNull().default("pending"),
    expiresAt: instant("expires_at").notNull(),
    createdAt: instant("created_at").notNull().defaultNow(),
    inviterId: text("inviter_id").notNull().references(() => user.id, { onDelete: "cascade" }),
  },
  (table) => [
    index("invitation_team").on(table.organizationId),
    index("invitation_email").on(table.email),
    check("invitation_role_known", sql`${table.role} in (${roleList})`),
    accountPolicy("invitation"),
    memberPolicy("invitation", sql`organization_id = ${currentTeam}`),
  ],
);

/** Keys of scripts; `key` is a hash, `metadata` JSON with the team and the scope. */
export const apikey = pgTable(
  "apikey",
  {
    id: text("id").primaryKey(),
    configId: text("config_id").notNull().default("default"),
    name: text("name"),
    start: text("start"),
    referenceId: text("reference_id").notNull().references(() => user.id, { onDelete: "cascade" }),
    prefix: text("prefix"),
    key: text("key").notNull(),
    refillInterval: integer("refill_interval"),
    refillAmount: integer("refill_amount"),
    lastRefillAt: instant("last_refill_at"),
    enabled: boolean("enabled").default(true),
    rateLimitEnabled: boolean("rate_limit_enabled").default(false),
    rateLimitTimeWindow: integer("rate_limit_time_window"),
    rateLimitMax: integer("rate_limit_max"),
    requestCount: integer("request_count").default(0),
    remaining: integer("remaining"),
    lastRequest: instant("last_request"),
    expiresAt: instant("expires_at"),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
    permissions: text("permissions"),
    metadata: text("metadata"),
  },
  (table) => [
    index("apikey_reference").on(table.referenceId),
    index("apikey_config").on(table.configId),
    index("apikey_key").on(table.key),
    accountPolicy("apikey"),
  ],
);

/** Attempts at signing in and the like, counted by what is being guessed at and from where. */
export const throttle = pgTable(
  "throttle",
  {
    key: text("key").primaryKey(),
    attempts: integer("attempts").notNull(),
    windowStartedAt: instant("window_started_at").notNull(),
  },
  (table) => [index("throttle_started").on(table.windowStartedAt), accountPolicy("throttle")],
);
