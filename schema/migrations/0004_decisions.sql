CREATE TABLE "attachments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"detection_id" uuid NOT NULL,
	"subject_id" uuid,
	"uploaded_by" uuid NOT NULL,
	"file_name" text NOT NULL,
	"media_type" text NOT NULL,
	"bytes" integer NOT NULL,
	"sha256" text NOT NULL,
	"file_key" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "bindings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"survey_id" uuid NOT NULL,
	"catalogue_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"detection_id" uuid NOT NULL,
	"override_id" uuid,
	"name" text NOT NULL,
	"state" text NOT NULL,
	"candidates" jsonb NOT NULL,
	"row" integer,
	"successor_id" uuid,
	"answered_by" uuid,
	"note" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "doubt_words" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"detection_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"doubt" text NOT NULL,
	"word" text NOT NULL,
	"grade" text NOT NULL,
	"note" text NOT NULL,
	"carried_from" uuid,
	"created_by" uuid NOT NULL,
	"withdrawn_at" timestamp with time zone,
	"withdrawn_by" uuid,
	"withdrawn_note" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "note_phrases" (
	"team_id" uuid PRIMARY KEY NOT NULL,
	"phrases" jsonb NOT NULL
);
--> statement-breakpoint
CREATE TABLE "remarks" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"detection_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"text" text NOT NULL,
	"mentions" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "returns" (
	"run_id" uuid NOT NULL,
	"detection_id" uuid NOT NULL,
	"reviewer_id" uuid NOT NULL,
	"review_id" uuid NOT NULL,
	"moved" jsonb NOT NULL,
	CONSTRAINT "returns_run_id_detection_id_reviewer_id_pk" PRIMARY KEY("run_id","detection_id","reviewer_id")
);
--> statement-breakpoint
ALTER TABLE "assignments" DROP CONSTRAINT "assignments_detection_id_detections_id_fk";
--> statement-breakpoint
ALTER TABLE "overrides" DROP CONSTRAINT "overrides_detection_id_detections_id_fk";
--> statement-breakpoint
ALTER TABLE "overrides" DROP CONSTRAINT "overrides_catalogue_id_catalogues_id_fk";
--> statement-breakpoint
ALTER TABLE "overrides" ADD COLUMN "ra_deg" double precision;--> statement-breakpoint
ALTER TABLE "overrides" ADD COLUMN "dec_deg" double precision;--> statement-breakpoint
ALTER TABLE "overrides" ADD COLUMN "carried_from" uuid;--> statement-breakpoint
ALTER TABLE "reviews" ADD COLUMN "outcome" text DEFAULT 'verdict' NOT NULL;--> statement-breakpoint
ALTER TABLE "reviews" ADD COLUMN "blind" boolean DEFAULT true NOT NULL;--> statement-breakpoint
ALTER TABLE "reviews" ADD COLUMN "carried_from" uuid;--> statement-breakpoint
ALTER TABLE "reviews" ADD COLUMN "withdrawn_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "settlements" ADD COLUMN "outcome" text DEFAULT 'verdict' NOT NULL;--> statement-breakpoint
ALTER TABLE "settlements" ADD COLUMN "carried_from" uuid;--> statement-breakpoint
ALTER TABLE "settlements" ADD COLUMN "moved" jsonb;--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attachments" ADD CONSTRAINT "attachments_uploaded_by_users_id_fk" FOREIGN KEY ("uploaded_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_survey_id_surveys_id_fk" FOREIGN KEY ("survey_id") REFERENCES "public"."surveys"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_catalogue_id_catalogues_id_fk" FOREIGN KEY ("catalogue_id") REFERENCES "public"."catalogues"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_override_id_overrides_id_fk" FOREIGN KEY ("override_id") REFERENCES "public"."overrides"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_successor_id_detections_id_fk" FOREIGN KEY ("successor_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bindings" ADD CONSTRAINT "bindings_answered_by_users_id_fk" FOREIGN KEY ("answered_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "doubt_words" ADD CONSTRAINT "doubt_words_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "doubt_words" ADD CONSTRAINT "doubt_words_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "doubt_words" ADD CONSTRAINT "doubt_words_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "doubt_words" ADD CONSTRAINT "doubt_words_withdrawn_by_users_id_fk" FOREIGN KEY ("withdrawn_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "note_phrases" ADD CONSTRAINT "note_phrases_team_id_teams_id_fk" FOREIGN KEY ("team_id") REFERENCES "public"."teams"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remarks" ADD CONSTRAINT "remarks_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "returns" ADD CONSTRAINT "returns_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "returns" ADD CONSTRAINT "returns_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "returns" ADD CONSTRAINT "returns_reviewer_id_users_id_fk" FOREIGN KEY ("reviewer_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "returns" ADD CONSTRAINT "returns_review_id_reviews_id_fk" FOREIGN KEY ("review_id") REFERENCES "public"."reviews"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachments_detection" ON "attachments" USING btree ("detection_id");--> statement-breakpoint
CREATE INDEX "attachments_subject" ON "attachments" USING btree ("subject_id");--> statement-breakpoint
CREATE INDEX "bindings_survey" ON "bindings" USING btree ("survey_id","state");--> statement-breakpoint
CREATE INDEX "bindings_successor" ON "bindings" USING btree ("successor_id");--> statement-breakpoint
CREATE UNIQUE INDEX "doubt_words_current" ON "doubt_words" USING btree ("detection_id","doubt") WHERE withdrawn_at is null;--> statement-breakpoint
CREATE INDEX "remarks_detection" ON "remarks" USING btree ("detection_id");--> statement-breakpoint
ALTER TABLE "assignments" ADD CONSTRAINT "assignments_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overrides" ADD CONSTRAINT "overrides_detection_id_detections_id_fk" FOREIGN KEY ("detection_id") REFERENCES "public"."detections"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overrides" ADD CONSTRAINT "overrides_catalogue_id_catalogues_id_fk" FOREIGN KEY ("catalogue_id") REFERENCES "public"."catalogues"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "reviews_run" ON "reviews" USING btree ("run_id");--> statement-breakpoint
CREATE UNIQUE INDEX "reviews_current" ON "reviews" USING btree ("detection_id","run_id","reviewer_id") WHERE superseded_at is null;