ALTER TABLE "people" ADD COLUMN "last_seen_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "people" ADD COLUMN "removed_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_removed_disabled" CHECK ("people"."removed_at" is null or "people"."disabled_at" is not null);