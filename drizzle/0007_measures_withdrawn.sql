CREATE TABLE "run_measures_withdrawn" (
	"measure_id" uuid PRIMARY KEY NOT NULL,
	"workshop_id" uuid NOT NULL,
	"withdrawn_by" uuid,
	"withdrawn_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "run_measures_withdrawn" ADD CONSTRAINT "run_measures_withdrawn_measure_id_run_measures_id_fk" FOREIGN KEY ("measure_id") REFERENCES "public"."run_measures"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_measures_withdrawn" ADD CONSTRAINT "run_measures_withdrawn_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run_measures_withdrawn" ADD CONSTRAINT "run_measures_withdrawn_withdrawn_by_persons_id_fk" FOREIGN KEY ("withdrawn_by") REFERENCES "public"."persons"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
-- Said once, and gone only with its measure.
grant select, insert on run_measures_withdrawn to countershade_app;
--> statement-breakpoint
revoke update, delete on run_measures_withdrawn from countershade_app;
--> statement-breakpoint
alter table run_measures_withdrawn enable row level security;
--> statement-breakpoint
create policy own_workshop on run_measures_withdrawn using (workshop_id = app_workshop()) with check (workshop_id = app_workshop());
--> statement-breakpoint
create trigger frozen before update on run_measures_withdrawn for each row execute function refuse_change('withdrawn_by');
