ALTER TABLE "map_values" ADD COLUMN "x" "bytea" NOT NULL;--> statement-breakpoint
ALTER TABLE "map_values" ADD COLUMN "y" "bytea" NOT NULL;--> statement-breakpoint
ALTER TABLE "map_values" ADD COLUMN "measure" text NOT NULL;--> statement-breakpoint
ALTER TABLE "map_values" ADD COLUMN "others" text NOT NULL;--> statement-breakpoint
ALTER TABLE "runs" ADD COLUMN "figures" jsonb;--> statement-breakpoint
ALTER TABLE "map_values" ADD CONSTRAINT "map_values_axes" CHECK (octet_length("map_values"."x") = 8 * "map_values"."columns" and octet_length("map_values"."y") = 8 * "map_values"."rows");