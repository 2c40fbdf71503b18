CREATE TABLE "account" (
	"id" text PRIMARY KEY NOT NULL,
	"account_id" text NOT NULL,
	"provider_id" text NOT NULL,
	"user_id" text NOT NULL,
	"access_token" text,
	"refresh_token" text,
	"id_token" text,
	"access_token_expires_at" timestamp with time zone,
	"refresh_token_expires_at" timestamp with time zone,
	"scope" text,
	"password" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "account" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "apikey" (
	"id" text PRIMARY KEY NOT NULL,
	"config_id" text DEFAULT 'default' NOT NULL,
	"name" text,
	"start" text,
	"reference_id" text NOT NULL,
	"prefix" text,
	"key" text NOT NULL,
	"refill_interval" integer,
	"refill_amount" integer,
	"last_refill_at" timestamp with time zone,
	"enabled" boolean DEFAULT true,
	"rate_limit_enabled" boolean DEFAULT false,
	"rate_limit_time_window" integer,
	"rate_limit_max" integer,
	"request_count" integer DEFAULT 0,
	"remaining" integer,
	"last_request" timestamp with time zone,
	"expires_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"permissions" text,
	"metadata" text
);
--> statement-breakpoint
ALTER TABLE "apikey" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "invitation" (
	"id" text PRIMARY KEY NOT NULL,
	"organization_id" text NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"status" text DEFAULT 'pending' NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"inviter_id" text NOT NULL,
	CONSTRAINT "invitation_role_known" CHECK ("invitation"."role" in ('owner', 'curator', 'analyst', 'observer'))
);
--> statement-breakpoint
ALTER TABLE "invitation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "member" (
	"id" text PRIMARY KEY NOT NULL,
	"organization_id" text NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "member_team_user" UNIQUE("organization_id","user_id"),
	CONSTRAINT "member_role_known" CHECK ("member"."role" in ('owner', 'curator', 'analyst', 'observer'))
);
--> statement-breakpoint
ALTER TABLE "member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "organization" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"slug" text NOT NULL,
	"logo" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"metadata" text,
	CONSTRAINT "organization_slug_unique" UNIQUE("slug")
);
--> statement-breakpoint
ALTER TABLE "organization" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "session" (
	"id" text PRIMARY KEY NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"token" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"user_id" text NOT NULL,
	"active_organization_id" text,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
ALTER TABLE "session" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "throttle" (
	"key" text PRIMARY KEY NOT NULL,
	"attempts" integer NOT NULL,
	"window_started_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "throttle" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "user" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "user_email_unique" UNIQUE("email")
);
--> statement-breakpoint
ALTER TABLE "user" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "verification" (
	"id" text PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "verification" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "advice" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"case_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"edition_number" integer NOT NULL,
	"model_version" text NOT NULL,
	"first_strategy" text,
	"fired_rules" text[] NOT NULL,
	"content" jsonb NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "advice_case_sequence" UNIQUE("case_id","sequence"),
	CONSTRAINT "advice_team_id" UNIQUE("team_id","id")
);
--> statement-breakpoint
ALTER TABLE "advice" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "machine" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"name" text NOT NULL,
	"cores_per_node" integer NOT NULL,
	"nodes" integer NOT NULL,
	"memory_per_node_gib" double precision NOT NULL,
	"bandwidth_per_node_gbps" double precision NOT NULL,
	"gflops_per_core" double precision NOT NULL,
	"network_latency_microseconds" double precision NOT NULL,
	"network_bandwidth_gbps" double precision NOT NULL,
	"demonstration" boolean DEFAULT false NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "machine_team_name" UNIQUE("team_id","name"),
	CONSTRAINT "machine_team_id" UNIQUE("team_id","id")
);
--> statement-breakpoint
ALTER TABLE "machine" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "solver_case" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"number" integer NOT NULL,
	"title" text NOT NULL,
	"questionnaire" jsonb NOT NULL,
	"answers" jsonb NOT NULL,
	"discretisation" text NOT NULL,
	"degree" integer NOT NULL,
	"mesh_family" text NOT NULL,
	"contrast_ratio" double precision NOT NULL,
	"unknowns" double precision NOT NULL,
	"cores" integer NOT NULL,
	"machine_id" uuid,
	"demonstration" boolean DEFAULT false NOT NULL,
	"author_id" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "solver_case_team_number" UNIQUE("team_id","number"),
	CONSTRAINT "solver_case_team_id" UNIQUE("team_id","id"),
	CONSTRAINT "solver_case_unknowns_positive" CHECK ("solver_case"."unknowns" > 0)
);
--> statement-breakpoint
ALTER TABLE "solver_case" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "team_counter" (
	"team_id" text PRIMARY KEY NOT NULL,
	"next_case" integer DEFAULT 1 NOT NULL,
	"next_edition" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "team_counter" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"actor_id" text,
	"action" text NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" text NOT NULL,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "audit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "edition" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"number" integer NOT NULL,
	"rules" jsonb NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"submitted_by" text,
	"approved_by" text,
	"origin" text NOT NULL,
	"published_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "edition_team_number" UNIQUE("team_id","number")
);
--> statement-breakpoint
ALTER TABLE "edition" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "idempotency_key" (
	"team_id" text NOT NULL,
	"key" text NOT NULL,
	"body_hash" text NOT NULL,
	"response" jsonb,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_key_team_id_key_pk" PRIMARY KEY("team_id","key")
);
--> statement-breakpoint
ALTER TABLE "idempotency_key" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "run" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"case_id" uuid NOT NULL,
	"advice_id" uuid,
	"strategy" text NOT NULL,
	"strategy_name" text,
	"outcome" text NOT NULL,
	"reason" text,
	"iterations" bigint,
	"setup_seconds" double precision,
	"solve_seconds" double precision,
	"peak_memory_gib" double precision,
	"cores" integer NOT NULL,
	"true_relative_residual" double precision,
	"monitored_relative_residual" double precision,
	"monitored_norm" text,
	"parameters" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"followed_advice" boolean,
	"note" text DEFAULT '' NOT NULL,
	"source" text NOT NULL,
	"measured_at" timestamp with time zone NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"author_id" text,
	"revision" integer DEFAULT 1 NOT NULL,
	"withdrawn_at" timestamp with time zone,
	"withdrawn_by" text,
	"withdrawn_reason" text,
	CONSTRAINT "run_team_id" UNIQUE("team_id","id"),
	CONSTRAINT "run_source_known" CHECK ("run"."source" in ('form', 'api', 'log', 'import', 'bench-pack', 'demonstration')),
	CONSTRAINT "run_outcome_known" CHECK ("run"."outcome" in ('converged', 'stalled', 'diverged', 'out-of-memory', 'over-time', 'broken'))
);
--> statement-breakpoint
ALTER TABLE "run" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "run_revision" (
	"team_id" text NOT NULL,
	"run_id" uuid NOT NULL,
	"revision" integer NOT NULL,
	"before" jsonb NOT NULL,
	"changed_by" text,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"explanation" text DEFAULT '' NOT NULL,
	CONSTRAINT "run_revision_run_id_revision_pk" PRIMARY KEY("run_id","revision")
);
--> statement-breakpoint
ALTER TABLE "run_revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "apikey" ADD CONSTRAINT "apikey_reference_id_user_id_fk" FOREIGN KEY ("reference_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_inviter_id_user_id_fk" FOREIGN KEY ("inviter_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_active_organization_id_organization_id_fk" FOREIGN KEY ("active_organization_id") REFERENCES "public"."organization"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "advice" ADD CONSTRAINT "advice_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "advice" ADD CONSTRAINT "advice_team_id_case_id_solver_case_team_id_id_fk" FOREIGN KEY ("team_id","case_id") REFERENCES "public"."solver_case"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "machine" ADD CONSTRAINT "machine_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "machine" ADD CONSTRAINT "machine_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "solver_case" ADD CONSTRAINT "solver_case_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "solver_case" ADD CONSTRAINT "solver_case_author_id_user_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "team_counter" ADD CONSTRAINT "team_counter_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit" ADD CONSTRAINT "audit_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit" ADD CONSTRAINT "audit_actor_id_user_id_fk" FOREIGN KEY ("actor_id") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "edition" ADD CONSTRAINT "edition_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "edition" ADD CONSTRAINT "edition_submitted_by_user_id_fk" FOREIGN KEY ("submitted_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "edition" ADD CONSTRAINT "edition_approved_by_user_id_fk" FOREIGN KEY ("approved_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "idempotency_key" ADD CONSTRAINT "idempotency_key_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_author_id_user_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_withdrawn_by_user_id_fk" FOREIGN KEY ("withdrawn_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_team_id_case_id_solver_case_team_id_id_fk" FOREIGN KEY ("team_id","case_id") REFERENCES "public"."solver_case"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_team_id_advice_id_advice_team_id_id_fk" FOREIGN KEY ("team_id","advice_id") REFERENCES "public"."advice"("team_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_revision" ADD CONSTRAINT "run_revision_changed_by_user_id_fk" FOREIGN KEY ("changed_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_revision" ADD CONSTRAINT "run_revision_team_id_run_id_run_team_id_id_fk" FOREIGN KEY ("team_id","run_id") REFERENCES "public"."run"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "account_user" ON "account" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "apikey_reference" ON "apikey" USING btree ("reference_id");--> statement-breakpoint
CREATE INDEX "apikey_config" ON "apikey" USING btree ("config_id");--> statement-breakpoint
CREATE INDEX "apikey_key" ON "apikey" USING btree ("key");--> statement-breakpoint
CREATE INDEX "invitation_team" ON "invitation" USING btree ("organization_id");--> statement-breakpoint
CREATE INDEX "invitation_email" ON "invitation" USING btree ("email");--> statement-breakpoint
CREATE INDEX "member_user" ON "member" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "session_user" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "throttle_started" ON "throttle" USING btree ("window_started_at");--> statement-breakpoint
CREATE INDEX "verification_identifier" ON "verification" USING btree ("identifier");--> statement-breakpoint
CREATE INDEX "advice_team_case" ON "advice" USING btree ("team_id","case_id","created_at");--> statement-breakpoint
CREATE INDEX "solver_case_team_created" ON "solver_case" USING btree ("team_id","created_at","id");--> statement-breakpoint
CREATE INDEX "audit_team_at" ON "audit" USING btree ("team_id","at","id");--> statement-breakpoint
CREATE INDEX "idempotency_key_created" ON "idempotency_key" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "run_team_case" ON "run" USING btree ("team_id","case_id","measured_at","id");--> statement-breakpoint
CREATE POLICY "account_auth" ON "account" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "apikey_auth" ON "apikey" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "invitation_auth" ON "invitation" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "invitation_team" ON "invitation" AS PERMISSIVE FOR SELECT TO "saddlemark_app" USING (organization_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "member_auth" ON "member" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "member_team" ON "member" AS PERMISSIVE FOR SELECT TO "saddlemark_app" USING (organization_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "organization_auth" ON "organization" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "organization_team" ON "organization" AS PERMISSIVE FOR SELECT TO "saddlemark_app" USING (id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "session_auth" ON "session" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "throttle_auth" ON "throttle" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "user_auth" ON "user" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "user_team" ON "user" AS PERMISSIVE FOR SELECT TO "saddlemark_app" USING (exists (select 1 from "member" m where m.user_id = "user"."id" and m.organization_id = nullif(current_setting('app.team_id', true), '')));--> statement-breakpoint
CREATE POLICY "verification_auth" ON "verification" AS PERMISSIVE FOR ALL TO "saddlemark_auth" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "advice_team" ON "advice" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "machine_team" ON "machine" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "solver_case_team" ON "solver_case" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "team_counter_team" ON "team_counter" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "audit_team" ON "audit" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "audit_membership" ON "audit" AS PERMISSIVE FOR INSERT TO "saddlemark_auth" WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "edition_team" ON "edition" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "idempotency_key_team" ON "idempotency_key" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "run_team" ON "run" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "run_revision_team" ON "run_revision" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));