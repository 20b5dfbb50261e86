CREATE TABLE "build_ups" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workshop_id" uuid NOT NULL,
	"name" varchar(80) NOT NULL,
	"sequence" jsonb NOT NULL,
	"edition" integer DEFAULT 1 NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"retired" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "build_ups" ADD CONSTRAINT "build_ups_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "build_ups_workshop" ON "build_ups" USING btree ("workshop_id","name");
--> statement-breakpoint
grant select, insert, update, delete on build_ups to countershade_app;
--> statement-breakpoint
alter table build_ups enable row level security;
--> statement-breakpoint
create policy own_workshop on build_ups using (workshop_id = app_workshop()) with check (workshop_id = app_workshop());
