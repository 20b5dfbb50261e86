CREATE TABLE "bottles" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workshop_id" uuid NOT NULL,
	"paint_id" uuid NOT NULL,
	"code" varchar(64) NOT NULL,
	"lot" varchar(60) DEFAULT '' NOT NULL,
	"ml" double precision NOT NULL,
	"used_before" double precision DEFAULT 0 NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"opened_on" date,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "bottle_uses" (
	"workshop_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"paint_id" uuid NOT NULL,
	"bottle_id" uuid,
	"ml" double precision NOT NULL,
	CONSTRAINT "bottle_uses_one" UNIQUE NULLS NOT DISTINCT("run_id","paint_id","bottle_id")
);
--> statement-breakpoint
CREATE TABLE "run_bottles" (
	"workshop_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"paint_id" uuid NOT NULL,
	"bottle_id" uuid NOT NULL,
	CONSTRAINT "run_bottles_run_id_paint_id_pk" PRIMARY KEY("run_id","paint_id")
);
--> statement-breakpoint
CREATE TABLE "run_measures" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workshop_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"piece" integer NOT NULL,
	"photo_id" uuid,
	"zones" jsonb NOT NULL,
	"engine_version" text NOT NULL,
	"note" varchar(500) DEFAULT '' NOT NULL,
	"is_sample" boolean DEFAULT false NOT NULL,
	"measured_by" uuid,
	"measured_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "run_painters" (
	"workshop_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	CONSTRAINT "run_painters_run_id_person_id_pk" PRIMARY KEY("run_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "run_events" ADD COLUMN "clock_behind" double precision DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "run_events" ADD COLUMN "place" integer;--> statement-breakpoint
ALTER TABLE "runs" ADD COLUMN "names" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "runs" ADD COLUMN "room" jsonb;--> statement-breakpoint
ALTER TABLE "bottles" ADD CONSTRAINT "bottles_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bottles" ADD CONSTRAINT "bottles_paint_id_paints_id_fk" FOREIGN KEY ("paint_id") REFERENCES "public"."paints"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bottle_uses" ADD CONSTRAINT "bottle_uses_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bottle_uses" ADD CONSTRAINT "bottle_uses_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bottle_uses" ADD CONSTRAINT "bottle_uses_bottle_id_bottles_id_fk" FOREIGN KEY ("bottle_id") REFERENCES "public"."bottles"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_bottles" ADD CONSTRAINT "run_bottles_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_bottles" ADD CONSTRAINT "run_bottles_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_bottles" ADD CONSTRAINT "run_bottles_paint_id_paints_id_fk" FOREIGN KEY ("paint_id") REFERENCES "public"."paints"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_bottles" ADD CONSTRAINT "run_bottles_bottle_id_bottles_id_fk" FOREIGN KEY ("bottle_id") REFERENCES "public"."bottles"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_measures" ADD CONSTRAINT "run_measures_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_measures" ADD CONSTRAINT "run_measures_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_measures" ADD CONSTRAINT "run_measures_measured_by_persons_id_fk" FOREIGN KEY ("measured_by") REFERENCES "public"."persons"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_painters" ADD CONSTRAINT "run_painters_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_painters" ADD CONSTRAINT "run_painters_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_painters" ADD CONSTRAINT "run_painters_person_id_persons_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."persons"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "bottles_paint" ON "bottles" USING btree ("paint_id");--> statement-breakpoint
CREATE INDEX "bottles_code" ON "bottles" USING btree ("workshop_id","code");--> statement-breakpoint
CREATE INDEX "bottle_uses_bottle" ON "bottle_uses" USING btree ("bottle_id");--> statement-breakpoint
CREATE INDEX "run_measures_run" ON "run_measures" USING btree ("run_id","measured_at");--> statement-breakpoint
-- What was left of a paint becomes one open bottle of it, under a code made from its id.
INSERT INTO "bottles" ("workshop_id", "paint_id", "code", "ml")
	SELECT "workshop_id", "id", upper(substr(translate("id"::text, '-', ''), 1, 8)), "volume_left" FROM "paints" WHERE "volume_left" > 0;--> statement-breakpoint
ALTER TABLE "paints" DROP COLUMN "volume_left";
--> statement-breakpoint
grant select, insert, update, delete on bottles, bottle_uses, run_bottles, run_painters, run_measures to countershade_app;
--> statement-breakpoint
-- A measure is written once, like an act, and goes only with its run.
revoke update, delete on run_measures from countershade_app;
--> statement-breakpoint
do $$
declare t text;
begin
  foreach t in array array['bottles', 'bottle_uses', 'run_bottles', 'run_painters', 'run_measures'] loop
    execute format('alter table %I enable row level security', t);
    execute format('create policy own_workshop on %I using (workshop_id = app_workshop()) with check (workshop_id = app_workshop())', t);
  end loop;
end $$;
--> statement-breakpoint
create trigger frozen before update on run_measures for each row execute function refuse_change('measured_by');
