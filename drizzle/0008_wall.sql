-- All of these may be made by whoever owns the database.
create extension if not exists cube;
--> statement-breakpoint
create extension if not exists btree_gist;
--> statement-breakpoint
create extension if not exists pg_trgm;
--> statement-breakpoint
create extension if not exists btree_gin;
--> statement-breakpoint
CREATE TABLE "colour_fills" (
	"workshop_id" uuid NOT NULL,
	"scheme_id" uuid NOT NULL,
	"side" text NOT NULL,
	"engine_version" text DEFAULT '' NOT NULL,
	"stamp" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "colour_fills_scheme_id_side_pk" PRIMARY KEY("scheme_id","side")
);
--> statement-breakpoint
CREATE TABLE "saved_searches" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workshop_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"name" varchar(40) NOT NULL,
	"wish" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "scheme_colours" (
	"workshop_id" uuid NOT NULL,
	"scheme_id" uuid NOT NULL,
	"side" text NOT NULL,
	"zone" varchar(80) NOT NULL,
	"label" varchar(80) NOT NULL,
	"lightness" double precision NOT NULL,
	"a" double precision NOT NULL,
	"b" double precision NOT NULL,
	CONSTRAINT "scheme_colours_scheme_id_side_zone_pk" PRIMARY KEY("scheme_id","side","zone")
);
--> statement-breakpoint
CREATE TABLE "scheme_paints" (
	"workshop_id" uuid NOT NULL,
	"scheme_id" uuid NOT NULL,
	"paint_id" uuid NOT NULL,
	CONSTRAINT "scheme_paints_scheme_id_paint_id_pk" PRIMARY KEY("scheme_id","paint_id")
);
--> statement-breakpoint
CREATE TABLE "scheme_words" (
	"scheme_id" uuid PRIMARY KEY NOT NULL,
	"workshop_id" uuid NOT NULL,
	"names" text NOT NULL,
	"coats" text NOT NULL
);
--> statement-breakpoint
DROP INDEX "schemes_workshop";--> statement-breakpoint
ALTER TABLE "revisions" ALTER COLUMN "published_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "revisions" ALTER COLUMN "published_at" SET DEFAULT now();--> statement-breakpoint
ALTER TABLE "schemes" ALTER COLUMN "saved_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "schemes" ALTER COLUMN "saved_at" SET DEFAULT now();--> statement-breakpoint
ALTER TABLE "colour_fills" ADD CONSTRAINT "colour_fills_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "colour_fills" ADD CONSTRAINT "colour_fills_scheme_id_schemes_id_fk" FOREIGN KEY ("scheme_id") REFERENCES "public"."schemes"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "saved_searches" ADD CONSTRAINT "saved_searches_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "saved_searches" ADD CONSTRAINT "saved_searches_person_id_persons_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."persons"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_colours" ADD CONSTRAINT "scheme_colours_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_colours" ADD CONSTRAINT "scheme_colours_scheme_id_schemes_id_fk" FOREIGN KEY ("scheme_id") REFERENCES "public"."schemes"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_paints" ADD CONSTRAINT "scheme_paints_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_paints" ADD CONSTRAINT "scheme_paints_scheme_id_schemes_id_fk" FOREIGN KEY ("scheme_id") REFERENCES "public"."schemes"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_words" ADD CONSTRAINT "scheme_words_scheme_id_schemes_id_fk" FOREIGN KEY ("scheme_id") REFERENCES "public"."schemes"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_words" ADD CONSTRAINT "scheme_words_workshop_id_workshops_id_fk" FOREIGN KEY ("workshop_id") REFERENCES "public"."workshops"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "colour_fills_due" ON "colour_fills" USING btree ("workshop_id","engine_version");--> statement-breakpoint
CREATE UNIQUE INDEX "saved_searches_name" ON "saved_searches" USING btree ("workshop_id","person_id","name");--> statement-breakpoint
CREATE INDEX "scheme_colours_near" ON "scheme_colours" USING gist ("workshop_id","side",cube(array["lightness", "a", "b"]));--> statement-breakpoint
CREATE INDEX "scheme_paints_paint" ON "scheme_paints" USING btree ("workshop_id","paint_id");--> statement-breakpoint
CREATE INDEX "scheme_words_names" ON "scheme_words" USING gin ("workshop_id","names" gin_trgm_ops);--> statement-breakpoint
CREATE INDEX "scheme_words_coats" ON "scheme_words" USING gin ("workshop_id","coats" gin_trgm_ops);--> statement-breakpoint
CREATE INDEX "schemes_person" ON "schemes" USING btree ("workshop_id","saved_by","saved_at");--> statement-breakpoint
CREATE INDEX "schemes_blank" ON "schemes" USING btree ("workshop_id","blank_id");--> statement-breakpoint
CREATE INDEX "schemes_fish" ON "schemes" USING btree ("workshop_id","fish");--> statement-breakpoint
CREATE INDEX "schemes_workshop" ON "schemes" USING btree ("workshop_id","retired","saved_at","id");
--> statement-breakpoint
grant select, insert, update, delete on scheme_colours, colour_fills, scheme_paints, scheme_words, saved_searches to countershade_app;
--> statement-breakpoint
do $$
declare t text;
begin
  foreach t in array array['scheme_colours', 'colour_fills', 'scheme_paints', 'scheme_words'] loop
    execute format('alter table %I enable row level security', t);
    execute format('create policy own_workshop on %I using (workshop_id = app_workshop()) with check (workshop_id = app_workshop())', t);
  end loop;
end $$;
--> statement-breakpoint
alter table saved_searches enable row level security;
--> statement-breakpoint
create policy own on saved_searches
  using (workshop_id = app_workshop() and person_id = app_person()) with check (workshop_id = app_workshop() and person_id = app_person());
--> statement-breakpoint
create function coat_names(draft jsonb) returns text language sql immutable as $$
  select coalesce(string_agg(name #>> '{}', E'\n'), '') from jsonb_path_query(draft, '$.stack[*].coat.name') as name
$$;
--> statement-breakpoint
-- What the wall is searched by is kept here, so that no way of writing a scheme can forget it.
create function note_scheme() returns trigger language plpgsql as $$
declare
  is_new boolean := tg_op = 'INSERT';
  is_other_draft boolean := is_new or new.draft is distinct from old.draft;
begin
  if is_other_draft or new.name is distinct from old.name or new.fish is distinct from old.fish then
    insert into scheme_words (scheme_id, workshop_id, names, coats)
      values (new.id, new.workshop_id, new.name || E'\n' || new.fish, coat_names(new.draft))
      on conflict (scheme_id) do update set names = excluded.names, coats = excluded.coats;
  end if;
  if is_other_draft then
    delete from scheme_paints where scheme_id = new.id;
    insert into scheme_paints (workshop_id, scheme_id, paint_id)
      select distinct new.workshop_id, new.id, (id #>> '{}')::uuid from jsonb_path_query(new.draft, '$.stack[*].coat.mix.parts[*].paintId') as id;
    insert into colour_fills (workshop_id, scheme_id, side) values (new.workshop_id, new.id, 'draft')
      on conflict (scheme_id, side) do update set engine_version = '', stamp = colour_fills.stamp + 1;
  end if;
  if new.head_number > 0 and (is_new or new.head_number is distinct from old.head_number) then
    insert into colour_fills (workshop_id, scheme_id, side) values (new.workshop_id, new.id, 'head')
      on conflict (scheme_id, side) do update set engine_version = '', stamp = colour_fills.stamp + 1;
  end if;
  return null;
end $$;
--> statement-breakpoint
create trigger noted after insert or update of name, fish, draft, head_number on schemes for each row execute function note_scheme();
--> statement-breakpoint
create function note_paint() returns trigger language plpgsql as $$
begin
  update colour_fills set engine_version = '', stamp = stamp + 1
    where workshop_id = new.workshop_id and side = 'draft'
      and scheme_id in (select scheme_id from scheme_paints where workshop_id = new.workshop_id and paint_id = new.id);
  return null;
end $$;
--> statement-breakpoint
create trigger noted after update on paints for each row
  when ((old.optics_id, old.kind, old.base, old.reducer_per_100, old.film_per_pass, old.volume_solids)
    is distinct from (new.optics_id, new.kind, new.base, new.reducer_per_100, new.film_per_pass, new.volume_solids))
  execute function note_paint();
--> statement-breakpoint
create function note_blank() returns trigger language plpgsql as $$
begin
  update colour_fills set engine_version = '', stamp = stamp + 1
    where workshop_id = new.workshop_id and side = 'draft'
      and scheme_id in (select id from schemes where workshop_id = new.workshop_id and blank_id = new.id);
  return null;
end $$;
--> statement-breakpoint
create trigger noted after update on blanks for each row when (old.shape is distinct from new.shape) execute function note_blank();
--> statement-breakpoint
-- A comparison by letters may not use an index from behind the wall, since it could tell of rows on the other side.
-- This door does, and names the acting workshop itself.
create function schemes_worded(word text, as_recipes boolean) returns setof uuid
  language sql stable security definer set search_path = public, pg_temp as $$
  select scheme_id from scheme_words where workshop_id = app_workshop() and names ilike word
  union all
  select scheme_id from scheme_words where as_recipes and workshop_id = app_workshop() and coats ilike word
  union all
  select s.id from blanks b join schemes s on s.blank_id = b.id
    where as_recipes and b.workshop_id = app_workshop() and s.workshop_id = app_workshop() and b.name ilike word
$$;
--> statement-breakpoint
insert into scheme_words (scheme_id, workshop_id, names, coats) select id, workshop_id, name || E'\n' || fish, coat_names(draft) from schemes;
--> statement-breakpoint
insert into scheme_paints (workshop_id, scheme_id, paint_id)
  select distinct s.workshop_id, s.id, (p #>> '{}')::uuid from schemes s, jsonb_path_query(s.draft, '$.stack[*].coat.mix.parts[*].paintId') as p;
--> statement-breakpoint
insert into colour_fills (workshop_id, scheme_id, side) select workshop_id, id, 'draft' from schemes;
--> statement-breakpoint
insert into colour_fills (workshop_id, scheme_id, side) select workshop_id, id, 'head' from schemes where head_number > 0;
