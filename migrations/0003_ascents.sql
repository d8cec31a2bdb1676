CREATE TYPE "public"."ascent_state" AS ENUM('waiting', 'flying', 'done', 'failed', 'cancelled');--> statement-breakpoint
CREATE TYPE "public"."losses_source" AS ENUM('entered', 'flown');--> statement-breakpoint
CREATE TABLE "ascent" (
	"hash" text PRIMARY KEY NOT NULL,
	"vehicle_hash" text NOT NULL,
	"task" jsonb NOT NULL,
	"method" integer NOT NULL,
	"state" "ascent_state" DEFAULT 'waiting' NOT NULL,
	"priority" integer DEFAULT 0 NOT NULL,
	"batch_id" uuid,
	"attempts" integer DEFAULT 0 NOT NULL,
	"failures" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"asked_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	"took_s" double precision,
	"outcome" jsonb,
	"trajectory" "bytea"
);
--> statement-breakpoint
CREATE TABLE "ascent_request" (
	"study_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"orbit_id" uuid NOT NULL,
	"hash" text NOT NULL,
	"priority" integer NOT NULL,
	"requested_by" text NOT NULL,
	"requested_at" timestamp with time zone DEFAULT now() NOT NULL,
	"cancelled_at" timestamp with time zone,
	CONSTRAINT "ascent_request_study_id_site_id_orbit_id_hash_pk" PRIMARY KEY("study_id","site_id","orbit_id","hash")
);
--> statement-breakpoint
CREATE TABLE "ascent_vehicle" (
	"hash" text PRIMARY KEY NOT NULL,
	"vehicle" jsonb NOT NULL
);
--> statement-breakpoint
ALTER TABLE "study" ADD COLUMN "losses" "losses_source" DEFAULT 'entered' NOT NULL;--> statement-breakpoint
ALTER TABLE "ascent" ADD CONSTRAINT "ascent_vehicle_hash_ascent_vehicle_hash_fk" FOREIGN KEY ("vehicle_hash") REFERENCES "public"."ascent_vehicle"("hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ascent_request" ADD CONSTRAINT "ascent_request_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ascent_request" ADD CONSTRAINT "ascent_request_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ascent_request" ADD CONSTRAINT "ascent_request_hash_ascent_hash_fk" FOREIGN KEY ("hash") REFERENCES "public"."ascent"("hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ascent_request" ADD CONSTRAINT "ascent_request_requested_by_user_id_fk" FOREIGN KEY ("requested_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "ascent_state_idx" ON "ascent" USING btree ("state","priority","asked_at");--> statement-breakpoint
CREATE INDEX "ascent_finished_at_idx" ON "ascent" USING btree ("finished_at");--> statement-breakpoint
CREATE INDEX "ascent_batch_idx" ON "ascent" USING btree ("batch_id");--> statement-breakpoint
CREATE INDEX "ascent_request_hash_idx" ON "ascent_request" USING btree ("hash");