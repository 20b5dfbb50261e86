ALTER TABLE "runs" ADD COLUMN "made_of" text;--> statement-breakpoint
ALTER TABLE "runs" ADD COLUMN "steps_form" integer DEFAULT 1 NOT NULL;