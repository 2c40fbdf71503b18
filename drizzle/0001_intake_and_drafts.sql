CREATE TABLE "draft" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"title" text NOT NULL,
	"based_on" integer NOT NULL,
	"rules" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"status" text DEFAULT 'open' NOT NULL,
	"origin" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_by" text,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"submitted_by" text,
	"submitted_at" timestamp with time zone,
	"published_as" integer,
	CONSTRAINT "draft_team_id" UNIQUE("team_id","id"),
	CONSTRAINT "draft_status_known" CHECK ("draft"."status" in ('open', 'submitted', 'published', 'discarded'))
);
--> statement-breakpoint
ALTER TABLE "draft" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "proposal_search" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"edition_number" integer NOT NULL,
	"status" text DEFAULT 'queued' NOT NULL,
	"progress" double precision DEFAULT 0 NOT NULL,
	"result" jsonb,
	"failure" text,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	"automatic" boolean DEFAULT false NOT NULL,
	CONSTRAINT "proposal_search_status_known" CHECK ("proposal_search"."status" in ('queued', 'running', 'done', 'failed', 'cancelled'))
);
--> statement-breakpoint
ALTER TABLE "proposal_search" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "replay" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"draft_id" uuid NOT NULL,
	"draft_version" integer NOT NULL,
	"edition_number" integer NOT NULL,
	"status" text DEFAULT 'queued' NOT NULL,
	"progress" double precision DEFAULT 0 NOT NULL,
	"result" jsonb,
	"failure" text,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	CONSTRAINT "replay_status_known" CHECK ("replay"."status" in ('queued', 'running', 'done', 'failed', 'cancelled'))
);
--> statement-breakpoint
ALTER TABLE "replay" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "log_mapping" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"name" text NOT NULL,
	"mapping" jsonb NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "log_mapping_team_name" UNIQUE("team_id","name")
);
--> statement-breakpoint
ALTER TABLE "log_mapping" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "run_log" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"case_id" uuid NOT NULL,
	"run_id" uuid,
	"file_name" text DEFAULT '' NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"parsed" jsonb NOT NULL,
	"findings" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "run_log" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "webhook" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"url" text NOT NULL,
	"secret" text NOT NULL,
	"events" text[] NOT NULL,
	"enabled" boolean DEFAULT true NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "webhook_team_id" UNIQUE("team_id","id")
);
--> statement-breakpoint
ALTER TABLE "webhook" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "webhook_delivery" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"team_id" text NOT NULL,
	"webhook_id" uuid NOT NULL,
	"event" text NOT NULL,
	"payload" jsonb NOT NULL,
	"status" text DEFAULT 'waiting' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_answer" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"delivered_at" timestamp with time zone,
	CONSTRAINT "webhook_delivery_status_known" CHECK ("webhook_delivery"."status" in ('waiting', 'delivered', 'given-up'))
);
--> statement-breakpoint
ALTER TABLE "webhook_delivery" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "solver_case" ADD COLUMN "series" text;--> statement-breakpoint
ALTER TABLE "solver_case" ADD COLUMN "reminded_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "solver_case" ADD COLUMN "no_run_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "edition" ADD COLUMN "alone" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "velocity_error" double precision;--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "pressure_error" double precision;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_updated_by_user_id_fk" FOREIGN KEY ("updated_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_submitted_by_user_id_fk" FOREIGN KEY ("submitted_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "proposal_search" ADD CONSTRAINT "proposal_search_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "proposal_search" ADD CONSTRAINT "proposal_search_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "replay" ADD CONSTRAINT "replay_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "replay" ADD CONSTRAINT "replay_team_id_draft_id_draft_team_id_id_fk" FOREIGN KEY ("team_id","draft_id") REFERENCES "public"."draft"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "log_mapping" ADD CONSTRAINT "log_mapping_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "log_mapping" ADD CONSTRAINT "log_mapping_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_log" ADD CONSTRAINT "run_log_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_log" ADD CONSTRAINT "run_log_team_id_case_id_solver_case_team_id_id_fk" FOREIGN KEY ("team_id","case_id") REFERENCES "public"."solver_case"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_log" ADD CONSTRAINT "run_log_team_id_run_id_run_team_id_id_fk" FOREIGN KEY ("team_id","run_id") REFERENCES "public"."run"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "webhook" ADD CONSTRAINT "webhook_team_id_organization_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "webhook" ADD CONSTRAINT "webhook_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "webhook_delivery" ADD CONSTRAINT "webhook_delivery_team_id_webhook_id_webhook_team_id_id_fk" FOREIGN KEY ("team_id","webhook_id") REFERENCES "public"."webhook"("team_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "draft_team_updated" ON "draft" USING btree ("team_id","updated_at");--> statement-breakpoint
CREATE INDEX "proposal_search_team" ON "proposal_search" USING btree ("team_id","created_at");--> statement-breakpoint
CREATE INDEX "replay_team_draft" ON "replay" USING btree ("team_id","draft_id","created_at");--> statement-breakpoint
CREATE INDEX "run_log_team_run" ON "run_log" USING btree ("team_id","run_id");--> statement-breakpoint
CREATE INDEX "run_log_team_case" ON "run_log" USING btree ("team_id","case_id");--> statement-breakpoint
CREATE INDEX "webhook_delivery_team" ON "webhook_delivery" USING btree ("team_id","created_at");--> statement-breakpoint
CREATE POLICY "draft_team" ON "draft" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "proposal_search_team" ON "proposal_search" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "replay_team" ON "replay" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "log_mapping_team" ON "log_mapping" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "run_log_team" ON "run_log" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "webhook_team" ON "webhook" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));--> statement-breakpoint
CREATE POLICY "webhook_delivery_team" ON "webhook_delivery" AS PERMISSIVE FOR ALL TO "saddlemark_app" USING (team_id = nullif(current_setting('app.team_id', true), '')) WITH CHECK (team_id = nullif(current_setting('app.team_id', true), ''));