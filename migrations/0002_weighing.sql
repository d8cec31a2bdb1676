CREATE TYPE "public"."weight_method" AS ENUM('points', 'swing', 'pairwise', 'centroid');--> statement-breakpoint
ALTER TYPE "public"."criterion_source" ADD VALUE 'rating';--> statement-breakpoint
CREATE TABLE "criterion_group" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	"version" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE TABLE "what_if" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"user_id" text NOT NULL,
	"name" text NOT NULL,
	"shared" boolean DEFAULT false NOT NULL,
	"changes" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "evidence" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"criterion_id" uuid NOT NULL,
	"file_name" text NOT NULL,
	"media_type" text NOT NULL,
	"bytes" "bytea" NOT NULL,
	"sha256" text NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "criterion" ADD COLUMN "shape" jsonb DEFAULT '{"kind":"straight"}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "criterion" ADD COLUMN "group_id" uuid;--> statement-breakpoint
ALTER TABLE "criterion" ADD COLUMN "rating_steps" jsonb;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "method" "weight_method" DEFAULT 'points' NOT NULL;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "order" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "judgements" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "shared" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "origin" jsonb;--> statement-breakpoint
ALTER TABLE "weight_set" ADD COLUMN "reason" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "site" ADD COLUMN "particulars" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "criterion_group" ADD CONSTRAINT "criterion_group_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "what_if" ADD CONSTRAINT "what_if_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "what_if" ADD CONSTRAINT "what_if_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence" ADD CONSTRAINT "evidence_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence" ADD CONSTRAINT "evidence_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "evidence" ADD CONSTRAINT "evidence_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "criterion_group_study_name_idx" ON "criterion_group" USING btree ("study_id","name_key");--> statement-breakpoint
CREATE INDEX "what_if_study_idx" ON "what_if" USING btree ("study_id","user_id");--> statement-breakpoint
CREATE INDEX "evidence_study_idx" ON "evidence" USING btree ("study_id","site_id","criterion_id");--> statement-breakpoint
ALTER TABLE "criterion" ADD CONSTRAINT "criterion_group_id_criterion_group_id_fk" FOREIGN KEY ("group_id") REFERENCES "public"."criterion_group"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "criterion" ADD CONSTRAINT "criterion_steps" CHECK (("criterion"."rating_steps" is not null) = ("criterion"."source"::text = 'rating'));