CREATE TYPE "public"."criterion_source" AS ENUM('computed', 'entered', 'text');--> statement-breakpoint
CREATE TYPE "public"."direction" AS ENUM('more', 'less');--> statement-breakpoint
CREATE TYPE "public"."level_mode" AS ENUM('candidates', 'fixed');--> statement-breakpoint
CREATE TYPE "public"."limit_kind" AS ENUM('at-least', 'at-most');--> statement-breakpoint
CREATE TYPE "public"."mail_state" AS ENUM('queued', 'sent', 'failed');--> statement-breakpoint
CREATE TYPE "public"."upload_state" AS ENUM('read', 'committed', 'undone');--> statement-breakpoint
CREATE TYPE "public"."injection_profile" AS ENUM('auto', 'direct', 'parking');--> statement-breakpoint
CREATE TYPE "public"."member_role" AS ENUM('lead', 'engineer', 'reviewer', 'reader');--> statement-breakpoint
CREATE TYPE "public"."study_state" AS ENUM('draft', 'in-review', 'baselined');--> statement-breakpoint
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
CREATE TABLE "invitation" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text,
	"administrator" boolean DEFAULT false NOT NULL,
	"sha256" text NOT NULL,
	"invited_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"revoked_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "personal_key" (
	"id" uuid PRIMARY KEY NOT NULL,
	"user_id" text NOT NULL,
	"name" text NOT NULL,
	"start" text NOT NULL,
	"sha256" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "personal_key_sha256_unique" UNIQUE("sha256")
);
--> statement-breakpoint
CREATE TABLE "rate_limit" (
	"id" text PRIMARY KEY NOT NULL,
	"key" text NOT NULL,
	"count" integer NOT NULL,
	"last_request" bigint NOT NULL,
	CONSTRAINT "rate_limit_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" text PRIMARY KEY NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"token" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"user_id" text NOT NULL,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
CREATE TABLE "sign_in_failure" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"administrator" boolean DEFAULT false NOT NULL,
	"deactivated_at" timestamp with time zone,
	CONSTRAINT "user_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "verification" (
	"id" text PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "criterion" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	"unit" text DEFAULT '' NOT NULL,
	"direction" "direction" NOT NULL,
	"source" "criterion_source" NOT NULL,
	"quantity" text,
	"orbit_id" uuid,
	"level_mode" "level_mode" DEFAULT 'candidates' NOT NULL,
	"worst" double precision,
	"best" double precision,
	"limit_kind" "limit_kind",
	"limit_value" double precision,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "criterion_quantity" CHECK (("criterion"."quantity" is not null) = ("criterion"."source" = 'computed')),
	CONSTRAINT "criterion_limit" CHECK (("criterion"."limit_kind" is null) = ("criterion"."limit_value" is null)),
	CONSTRAINT "criterion_levels" CHECK ("criterion"."level_mode" = 'candidates' or ("criterion"."worst" is not null and "criterion"."best" is not null and "criterion"."worst" <> "criterion"."best"))
);
--> statement-breakpoint
CREATE TABLE "weight_set" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"user_id" text,
	"points" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "mail_message" (
	"id" uuid PRIMARY KEY NOT NULL,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"state" "mail_state" DEFAULT 'queued' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "outbox_message" (
	"id" uuid PRIMARY KEY NOT NULL,
	"from_address" text NOT NULL,
	"to_addresses" text[] NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"source" text NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "record" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "record_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"study_id" uuid,
	"user_id" text,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"revision" integer,
	"object" text NOT NULL,
	"object_id" text NOT NULL,
	"action" text NOT NULL,
	"from" jsonb,
	"to" jsonb
);
--> statement-breakpoint
CREATE TABLE "site" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"name_key" text NOT NULL,
	"latitude_deg" double precision NOT NULL,
	"longitude_deg" double precision NOT NULL,
	"elevation_m" double precision DEFAULT 0 NOT NULL,
	"permitted_azimuths_deg" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"notes" text DEFAULT '' NOT NULL,
	"values" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"upload_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone,
	CONSTRAINT "site_latitude" CHECK ("site"."latitude_deg" between -90 and 90),
	CONSTRAINT "site_longitude" CHECK ("site"."longitude_deg" > -180 and "site"."longitude_deg" <= 180)
);
--> statement-breakpoint
CREATE TABLE "upload" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"file_name" text NOT NULL,
	"bytes" "bytea" NOT NULL,
	"sha256" text NOT NULL,
	"reading" jsonb NOT NULL,
	"state" "upload_state" DEFAULT 'read' NOT NULL,
	"effect" jsonb,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"committed_at" timestamp with time zone,
	"undone_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "library_vehicle" (
	"id" uuid PRIMARY KEY NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"spec" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "library_vehicle_code_unique" UNIQUE("code")
);
--> statement-breakpoint
CREATE TABLE "member" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"email" text NOT NULL,
	"user_id" text,
	"role" "member_role" NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"added_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "study" (
	"id" uuid PRIMARY KEY NOT NULL,
	"title" text NOT NULL,
	"organisation" text DEFAULT '' NOT NULL,
	"question" text DEFAULT '' NOT NULL,
	"decide_by" date,
	"state" "study_state" DEFAULT 'draft' NOT NULL,
	"archived_at" timestamp with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	"saved_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"turn_speed_fraction" double precision DEFAULT 0.6 NOT NULL,
	"settings_version" integer DEFAULT 1 NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "study_turn_speed_fraction" CHECK ("study"."turn_speed_fraction" > 0 and "study"."turn_speed_fraction" <= 1)
);
--> statement-breakpoint
CREATE TABLE "study_vehicle" (
	"study_id" uuid PRIMARY KEY NOT NULL,
	"library_vehicle_id" uuid,
	"spec" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE TABLE "target_orbit" (
	"id" uuid PRIMARY KEY NOT NULL,
	"study_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"code" text NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"perigee_m" double precision NOT NULL,
	"apogee_m" double precision NOT NULL,
	"inclination_deg" double precision,
	"sun_synchronous" boolean DEFAULT false NOT NULL,
	"profile" "injection_profile" DEFAULT 'auto' NOT NULL,
	"parking_m" double precision DEFAULT 185000 NOT NULL,
	"flights_per_year" double precision DEFAULT 0 NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "target_orbit_altitudes" CHECK ("target_orbit"."perigee_m" <= "target_orbit"."apogee_m"),
	CONSTRAINT "target_orbit_inclination" CHECK (("target_orbit"."inclination_deg" is null) = "target_orbit"."sun_synchronous")
);
--> statement-breakpoint
ALTER TABLE "account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_invited_by_user_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "personal_key" ADD CONSTRAINT "personal_key_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "criterion" ADD CONSTRAINT "criterion_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "criterion" ADD CONSTRAINT "criterion_orbit_id_target_orbit_id_fk" FOREIGN KEY ("orbit_id") REFERENCES "public"."target_orbit"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weight_set" ADD CONSTRAINT "weight_set_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weight_set" ADD CONSTRAINT "weight_set_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "record" ADD CONSTRAINT "record_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "record" ADD CONSTRAINT "record_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site" ADD CONSTRAINT "site_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site" ADD CONSTRAINT "site_upload_id_upload_id_fk" FOREIGN KEY ("upload_id") REFERENCES "public"."upload"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_added_by_user_id_fk" FOREIGN KEY ("added_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "study" ADD CONSTRAINT "study_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "study_vehicle" ADD CONSTRAINT "study_vehicle_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "study_vehicle" ADD CONSTRAINT "study_vehicle_library_vehicle_id_library_vehicle_id_fk" FOREIGN KEY ("library_vehicle_id") REFERENCES "public"."library_vehicle"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "target_orbit" ADD CONSTRAINT "target_orbit_study_id_study_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."study"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "account_user_id_idx" ON "account" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitation_sha256_idx" ON "invitation" USING btree ("sha256");--> statement-breakpoint
CREATE INDEX "invitation_email_idx" ON "invitation" USING btree ("email");--> statement-breakpoint
CREATE INDEX "personal_key_user_id_idx" ON "personal_key" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "session_user_id_idx" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "sign_in_failure_email_at_idx" ON "sign_in_failure" USING btree ("email","at");--> statement-breakpoint
CREATE INDEX "verification_identifier_idx" ON "verification" USING btree ("identifier");--> statement-breakpoint
CREATE UNIQUE INDEX "criterion_study_name_idx" ON "criterion" USING btree ("study_id","name_key");--> statement-breakpoint
CREATE UNIQUE INDEX "weight_set_study_idx" ON "weight_set" USING btree ("study_id") WHERE user_id is null;--> statement-breakpoint
CREATE UNIQUE INDEX "weight_set_member_idx" ON "weight_set" USING btree ("study_id","user_id") WHERE user_id is not null;--> statement-breakpoint
CREATE INDEX "mail_message_created_at_idx" ON "mail_message" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "outbox_message_received_at_idx" ON "outbox_message" USING btree ("received_at");--> statement-breakpoint
CREATE INDEX "record_study_idx" ON "record" USING btree ("study_id","id");--> statement-breakpoint
CREATE INDEX "record_object_idx" ON "record" USING btree ("object","object_id");--> statement-breakpoint
CREATE UNIQUE INDEX "site_study_code_idx" ON "site" USING btree ("study_id","code") WHERE deleted_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "site_study_name_idx" ON "site" USING btree ("study_id","name_key") WHERE deleted_at is null;--> statement-breakpoint
CREATE INDEX "site_study_idx" ON "site" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "upload_study_idx" ON "upload" USING btree ("study_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "member_study_email_idx" ON "member" USING btree ("study_id","email");--> statement-breakpoint
CREATE UNIQUE INDEX "member_study_user_idx" ON "member" USING btree ("study_id","user_id");--> statement-breakpoint
CREATE INDEX "member_user_idx" ON "member" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "study_updated_at_idx" ON "study" USING btree ("updated_at");--> statement-breakpoint
CREATE UNIQUE INDEX "target_orbit_study_code_idx" ON "target_orbit" USING btree ("study_id","code");