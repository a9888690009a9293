CREATE TYPE "public"."product_role" AS ENUM('designer', 'reviewer', 'viewer');--> statement-breakpoint
CREATE TYPE "public"."organisation_role" AS ENUM('administrator', 'member');--> statement-breakpoint
CREATE TYPE "public"."review_state" AS ENUM('asked', 'approved', 'returned', 'withdrawn');--> statement-breakpoint
CREATE TYPE "public"."run_state" AS ENUM('queued', 'running', 'done', 'failed', 'cancelled');--> statement-breakpoint
CREATE TABLE "audit" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "audit_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"action" text NOT NULL,
	"object_kind" text NOT NULL,
	"object_id" text NOT NULL,
	"data" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"request_id" text
);
--> statement-breakpoint
CREATE TABLE "invitations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"token_hash" text NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"organisation_role" "organisation_role" DEFAULT 'member' NOT NULL,
	"may_create_products" boolean DEFAULT false NOT NULL,
	"invited_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"accepted_at" timestamp (3) with time zone,
	"accepted_by" uuid,
	"revoked_at" timestamp (3) with time zone,
	CONSTRAINT "invitations_token_hash" UNIQUE("token_hash"),
	CONSTRAINT "invitations_accepted" CHECK (("invitations"."accepted_at" is null) = ("invitations"."accepted_by" is null))
);
--> statement-breakpoint
CREATE TABLE "mail_outbox" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"recipient" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"due_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp (3) with time zone,
	"last_error" text
);
--> statement-breakpoint
CREATE TABLE "map_values" (
	"run_id" uuid PRIMARY KEY NOT NULL,
	"columns" integer NOT NULL,
	"rows" integer NOT NULL,
	"values" "bytea" NOT NULL,
	CONSTRAINT "map_values_complete" CHECK (octet_length("map_values"."values") = 8 * "map_values"."columns" * "map_values"."rows")
);
--> statement-breakpoint
CREATE TABLE "memberships" (
	"product_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" "product_role" NOT NULL,
	"changed_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "memberships_product_id_person_id_pk" PRIMARY KEY("product_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "organisation_settings" (
	"only" boolean PRIMARY KEY DEFAULT true NOT NULL,
	"name" text NOT NULL,
	"changed_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"changed_by" uuid,
	CONSTRAINT "organisation_settings_one_row" CHECK ("organisation_settings"."only")
);
--> statement-breakpoint
CREATE TABLE "part_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"part_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"parameters" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "part_revisions_number" UNIQUE("part_id","number"),
	CONSTRAINT "part_revisions_from_one" CHECK ("part_revisions"."number" >= 1)
);
--> statement-breakpoint
CREATE TABLE "parts" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"product_id" uuid NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp (3) with time zone,
	CONSTRAINT "parts_name_filled" CHECK (length(trim("parts"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "variant_revision_parts" (
	"variant_revision_id" uuid NOT NULL,
	"part_revision_id" uuid NOT NULL,
	CONSTRAINT "variant_revision_parts_variant_revision_id_part_revision_id_pk" PRIMARY KEY("variant_revision_id","part_revision_id")
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"password_hash" text NOT NULL,
	"organisation_role" "organisation_role" DEFAULT 'member' NOT NULL,
	"may_create_products" boolean DEFAULT false NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"disabled_at" timestamp (3) with time zone,
	CONSTRAINT "people_name_filled" CHECK (length(trim("people"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "preview_cache" (
	"answer_hash" text NOT NULL,
	"engine_version" text NOT NULL,
	"map_hash" text DEFAULT '' NOT NULL,
	"result" text NOT NULL,
	"last_used_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "preview_cache_answer_hash_engine_version_map_hash_pk" PRIMARY KEY("answer_hash","engine_version","map_hash")
);
--> statement-breakpoint
CREATE TABLE "products" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp (3) with time zone,
	CONSTRAINT "products_name_filled" CHECK (length(trim("products"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "review_comments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"review_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"text" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "reviews" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"scenario_revision_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"state" "review_state" DEFAULT 'asked' NOT NULL,
	"asked_by" uuid NOT NULL,
	"asked_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"decided_by" uuid,
	"decided_at" timestamp (3) with time zone,
	"withdrawn_at" timestamp (3) with time zone,
	"withdrawn_because" text,
	CONSTRAINT "reviews_decided" CHECK (("reviews"."decided_by" is null) = ("reviews"."decided_at" is null)),
	CONSTRAINT "reviews_decision_has_author" CHECK ("reviews"."state" not in ('approved', 'returned') or "reviews"."decided_by" is not null),
	CONSTRAINT "reviews_not_by_asker" CHECK ("reviews"."decided_by" <> "reviews"."asked_by"),
	CONSTRAINT "reviews_withdrawn" CHECK (("reviews"."state" = 'withdrawn') = ("reviews"."withdrawn_at" is not null))
);
--> statement-breakpoint
CREATE TABLE "run_events" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "run_events_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"run_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"data" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "runs" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"scenario_revision_id" uuid NOT NULL,
	"state" "run_state" DEFAULT 'queued' NOT NULL,
	"engine_version" text NOT NULL,
	"study_hash" text NOT NULL,
	"answer_hash" text NOT NULL,
	"requested_by" uuid NOT NULL,
	"queued_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp (3) with time zone,
	"finished_at" timestamp (3) with time zone,
	"cancel_requested_at" timestamp (3) with time zone,
	"attempts" integer DEFAULT 0 NOT NULL,
	"progress" real DEFAULT 0 NOT NULL,
	"result" text,
	"error" text,
	CONSTRAINT "runs_result_when_done" CHECK (("runs"."state" = 'done') = ("runs"."result" is not null)),
	CONSTRAINT "runs_error_when_failed" CHECK (("runs"."state" = 'failed') = ("runs"."error" is not null)),
	CONSTRAINT "runs_finished_when_over" CHECK (("runs"."state" in ('done', 'failed', 'cancelled')) = ("runs"."finished_at" is not null)),
	CONSTRAINT "runs_progress_share" CHECK ("runs"."progress" between 0 and 1)
);
--> statement-breakpoint
CREATE TABLE "scenario_drafts" (
	"scenario_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"base_revision_id" uuid,
	"version" integer DEFAULT 1 NOT NULL,
	"content" text NOT NULL,
	"saved_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "scenario_drafts_scenario_id_person_id_pk" PRIMARY KEY("scenario_id","person_id"),
	CONSTRAINT "scenario_drafts_version" CHECK ("scenario_drafts"."version" >= 1)
);
--> statement-breakpoint
CREATE TABLE "scenario_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"scenario_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"variant_revision_id" uuid NOT NULL,
	"tolerance_set" text NOT NULL,
	"study" text NOT NULL,
	"study_hash" text NOT NULL,
	"answer_hash" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "scenario_revisions_number" UNIQUE("scenario_id","number"),
	CONSTRAINT "scenario_revisions_from_one" CHECK ("scenario_revisions"."number" >= 1)
);
--> statement-breakpoint
CREATE TABLE "scenarios" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"variant_id" uuid NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp (3) with time zone,
	CONSTRAINT "scenarios_name_filled" CHECK (length(trim("scenarios"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"token_hash" text NOT NULL,
	"person_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"user_agent" text DEFAULT '' NOT NULL,
	"address" text DEFAULT '' NOT NULL,
	CONSTRAINT "sessions_token_hash" UNIQUE("token_hash")
);
--> statement-breakpoint
CREATE TABLE "variant_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"variant_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"description" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "variant_revisions_number" UNIQUE("variant_id","number"),
	CONSTRAINT "variant_revisions_from_one" CHECK ("variant_revisions"."number" >= 1)
);
--> statement-breakpoint
CREATE TABLE "variants" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"product_id" uuid NOT NULL,
	"name" text NOT NULL,
	"position" integer NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp (3) with time zone,
	CONSTRAINT "variants_name_filled" CHECK (length(trim("variants"."name")) > 0)
);
--> statement-breakpoint
CREATE TABLE "worker_heartbeats" (
	"worker_id" text PRIMARY KEY NOT NULL,
	"started_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"beat_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_invited_by_people_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_accepted_by_people_id_fk" FOREIGN KEY ("accepted_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "map_values" ADD CONSTRAINT "map_values_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_product_id_products_id_fk" FOREIGN KEY ("product_id") REFERENCES "public"."products"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "organisation_settings" ADD CONSTRAINT "organisation_settings_changed_by_people_id_fk" FOREIGN KEY ("changed_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_revisions" ADD CONSTRAINT "part_revisions_part_id_parts_id_fk" FOREIGN KEY ("part_id") REFERENCES "public"."parts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "part_revisions" ADD CONSTRAINT "part_revisions_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "parts" ADD CONSTRAINT "parts_product_id_products_id_fk" FOREIGN KEY ("product_id") REFERENCES "public"."products"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "variant_revision_parts" ADD CONSTRAINT "variant_revision_parts_variant_revision_id_variant_revisions_id_fk" FOREIGN KEY ("variant_revision_id") REFERENCES "public"."variant_revisions"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "variant_revision_parts" ADD CONSTRAINT "variant_revision_parts_part_revision_id_part_revisions_id_fk" FOREIGN KEY ("part_revision_id") REFERENCES "public"."part_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "products" ADD CONSTRAINT "products_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "review_comments" ADD CONSTRAINT "review_comments_review_id_reviews_id_fk" FOREIGN KEY ("review_id") REFERENCES "public"."reviews"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "review_comments" ADD CONSTRAINT "review_comments_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reviews" ADD CONSTRAINT "reviews_scenario_revision_id_scenario_revisions_id_fk" FOREIGN KEY ("scenario_revision_id") REFERENCES "public"."scenario_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reviews" ADD CONSTRAINT "reviews_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reviews" ADD CONSTRAINT "reviews_asked_by_people_id_fk" FOREIGN KEY ("asked_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reviews" ADD CONSTRAINT "reviews_decided_by_people_id_fk" FOREIGN KEY ("decided_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_events" ADD CONSTRAINT "run_events_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "runs" ADD CONSTRAINT "runs_scenario_revision_id_scenario_revisions_id_fk" FOREIGN KEY ("scenario_revision_id") REFERENCES "public"."scenario_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "runs" ADD CONSTRAINT "runs_requested_by_people_id_fk" FOREIGN KEY ("requested_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_drafts" ADD CONSTRAINT "scenario_drafts_scenario_id_scenarios_id_fk" FOREIGN KEY ("scenario_id") REFERENCES "public"."scenarios"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_drafts" ADD CONSTRAINT "scenario_drafts_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_drafts" ADD CONSTRAINT "scenario_drafts_base_revision_id_scenario_revisions_id_fk" FOREIGN KEY ("base_revision_id") REFERENCES "public"."scenario_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_revisions" ADD CONSTRAINT "scenario_revisions_scenario_id_scenarios_id_fk" FOREIGN KEY ("scenario_id") REFERENCES "public"."scenarios"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_revisions" ADD CONSTRAINT "scenario_revisions_variant_revision_id_variant_revisions_id_fk" FOREIGN KEY ("variant_revision_id") REFERENCES "public"."variant_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenario_revisions" ADD CONSTRAINT "scenario_revisions_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scenarios" ADD CONSTRAINT "scenarios_variant_id_variants_id_fk" FOREIGN KEY ("variant_id") REFERENCES "public"."variants"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "variant_revisions" ADD CONSTRAINT "variant_revisions_variant_id_variants_id_fk" FOREIGN KEY ("variant_id") REFERENCES "public"."variants"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "variant_revisions" ADD CONSTRAINT "variant_revisions_author_id_people_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "variants" ADD CONSTRAINT "variants_product_id_products_id_fk" FOREIGN KEY ("product_id") REFERENCES "public"."products"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_object" ON "audit" USING btree ("object_kind","object_id");--> statement-breakpoint
CREATE INDEX "audit_person" ON "audit" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_one_open" ON "invitations" USING btree (lower("email")) WHERE "invitations"."accepted_at" is null and "invitations"."revoked_at" is null;--> statement-breakpoint
CREATE INDEX "mail_outbox_due" ON "mail_outbox" USING btree ("due_at") WHERE "mail_outbox"."sent_at" is null;--> statement-breakpoint
CREATE INDEX "mail_outbox_created" ON "mail_outbox" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "memberships_person" ON "memberships" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "parts_name_unique" ON "parts" USING btree ("product_id",lower("name")) WHERE "parts"."archived_at" is null;--> statement-breakpoint
CREATE INDEX "variant_revision_parts_part" ON "variant_revision_parts" USING btree ("part_revision_id");--> statement-breakpoint
CREATE UNIQUE INDEX "people_email_unique" ON "people" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "preview_cache_last_used" ON "preview_cache" USING btree ("last_used_at");--> statement-breakpoint
CREATE UNIQUE INDEX "products_name_unique" ON "products" USING btree (lower("name")) WHERE "products"."archived_at" is null;--> statement-breakpoint
CREATE INDEX "review_comments_review" ON "review_comments" USING btree ("review_id","created_at");--> statement-breakpoint
CREATE INDEX "reviews_run" ON "reviews" USING btree ("run_id");--> statement-breakpoint
CREATE UNIQUE INDEX "reviews_one_open" ON "reviews" USING btree ("scenario_revision_id") WHERE "reviews"."state" = 'asked';--> statement-breakpoint
CREATE INDEX "run_events_run" ON "run_events" USING btree ("run_id","id");--> statement-breakpoint
CREATE INDEX "runs_scenario_revision" ON "runs" USING btree ("scenario_revision_id");--> statement-breakpoint
CREATE INDEX "runs_answer" ON "runs" USING btree ("answer_hash");--> statement-breakpoint
CREATE INDEX "runs_requested_by" ON "runs" USING btree ("requested_by");--> statement-breakpoint
CREATE INDEX "runs_open" ON "runs" USING btree ("state") WHERE "runs"."state" in ('queued', 'running');--> statement-breakpoint
CREATE INDEX "scenario_revisions_variant_revision" ON "scenario_revisions" USING btree ("variant_revision_id");--> statement-breakpoint
CREATE INDEX "scenario_revisions_answer" ON "scenario_revisions" USING btree ("answer_hash");--> statement-breakpoint
CREATE UNIQUE INDEX "scenarios_name_unique" ON "scenarios" USING btree ("variant_id",lower("name")) WHERE "scenarios"."archived_at" is null;--> statement-breakpoint
CREATE INDEX "sessions_person" ON "sessions" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "sessions_expiry" ON "sessions" USING btree ("expires_at");--> statement-breakpoint
CREATE UNIQUE INDEX "variants_name_unique" ON "variants" USING btree ("product_id",lower("name")) WHERE "variants"."archived_at" is null;--> statement-breakpoint
CREATE INDEX "variants_product" ON "variants" USING btree ("product_id","position");