ALTER TABLE "catalogues" ADD COLUMN "parts" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "intakes" ADD COLUMN "companions" jsonb DEFAULT '[]'::jsonb NOT NULL;