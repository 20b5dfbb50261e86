-- The second wall between workshops. The server works as a role that owns nothing; every row it sees or writes
-- must belong to what the transaction declared: app.workshop_id, app.person_id, app.session_id, app.email, app.token_hash.
do $$ begin
  if not exists (select from pg_roles where rolname = 'countershade_app') then
    create role countershade_app nologin;
  end if;
exception when duplicate_object or unique_violation then null; -- another database of this server was quicker
end $$;
--> statement-breakpoint
do $$ begin
  execute format('grant countershade_app to %I', current_user);
exception when others then
  if not pg_has_role(current_user, 'countershade_app', 'member') then raise; end if;
end $$;
--> statement-breakpoint
create function app_workshop() returns uuid language sql stable as $$ select nullif(current_setting('app.workshop_id', true), '')::uuid $$;
--> statement-breakpoint
create function app_person() returns uuid language sql stable as $$ select nullif(current_setting('app.person_id', true), '')::uuid $$;
--> statement-breakpoint
create function app_session() returns uuid language sql stable as $$ select nullif(current_setting('app.session_id', true), '')::uuid $$;
--> statement-breakpoint
create function app_email() returns text language sql stable as $$ select nullif(lower(current_setting('app.email', true)), '') $$;
--> statement-breakpoint
create function app_token_hash() returns text language sql stable as $$ select nullif(current_setting('app.token_hash', true), '') $$;
--> statement-breakpoint
grant usage on schema public to countershade_app;
--> statement-breakpoint
grant select, insert, update, delete on all tables in schema public to countershade_app;
--> statement-breakpoint
grant usage on all sequences in schema public to countershade_app;
--> statement-breakpoint
-- What is written once is never changed, and goes only with the whole it belongs to.
revoke update, delete on revisions, run_events, paint_optics from countershade_app;
--> statement-breakpoint
do $$
declare t text;
begin
  foreach t in array array['paint_optics', 'paints', 'blanks', 'masks', 'schemes', 'revisions', 'runs', 'run_events', 'photos', 'pictures'] loop
    execute format('alter table %I enable row level security', t);
    execute format('create policy own_workshop on %I using (workshop_id = app_workshop()) with check (workshop_id = app_workshop())', t);
  end loop;
end $$;
--> statement-breakpoint
alter table cards enable row level security;
--> statement-breakpoint
create policy own_workshop on cards using (workshop_id = app_workshop()) with check (workshop_id = app_workshop());
--> statement-breakpoint
create policy by_link on cards for select using (token_hash = app_token_hash());
--> statement-breakpoint
alter table invitations enable row level security;
--> statement-breakpoint
create policy own_workshop on invitations using (workshop_id = app_workshop()) with check (workshop_id = app_workshop());
--> statement-breakpoint
create policy by_link on invitations using (token_hash = app_token_hash()) with check (token_hash = app_token_hash());
--> statement-breakpoint
alter table password_resets enable row level security;
--> statement-breakpoint
create policy by_link on password_resets using (token_hash = app_token_hash()) with check (token_hash = app_token_hash());
--> statement-breakpoint
create policy own on password_resets using (person_id = app_person()) with check (person_id = app_person());
--> statement-breakpoint
alter table memberships enable row level security;
--> statement-breakpoint
create policy own_workshop on memberships using (workshop_id = app_workshop()) with check (workshop_id = app_workshop());
--> statement-breakpoint
create policy own on memberships for select using (person_id = app_person());
--> statement-breakpoint
alter table workshops enable row level security;
--> statement-breakpoint
create policy own_workshop on workshops using (id = app_workshop()) with check (id = app_workshop());
--> statement-breakpoint
create policy member on workshops for select using (exists (select from memberships m where m.workshop_id = workshops.id and m.person_id = app_person()));
--> statement-breakpoint
create policy invited on workshops for select using (exists (select from invitations i where i.workshop_id = workshops.id and i.token_hash = app_token_hash()));
--> statement-breakpoint
alter table persons enable row level security;
--> statement-breakpoint
create policy own on persons using (id = app_person()) with check (id = app_person());
--> statement-breakpoint
create policy by_email on persons using (lower(email) = app_email()) with check (lower(email) = app_email());
--> statement-breakpoint
create policy colleague on persons for select using (exists (select from memberships m where m.person_id = persons.id and m.workshop_id = app_workshop()));
--> statement-breakpoint
alter table sessions enable row level security;
--> statement-breakpoint
create policy by_cookie on sessions using (id = app_session());
--> statement-breakpoint
create policy own on sessions using (person_id = app_person()) with check (person_id = app_person());
--> statement-breakpoint
create policy own_workshop on sessions using (workshop_id = app_workshop()) with check (workshop_id is null or workshop_id = app_workshop());
--> statement-breakpoint
alter table idempotency_keys enable row level security;
--> statement-breakpoint
create policy own on idempotency_keys using (person_id = app_person()) with check (person_id = app_person());
--> statement-breakpoint
create function refuse_change() returns trigger language plpgsql as $$
declare
  kept jsonb := to_jsonb(new);
begin
  -- A person who left leaves their work; their name may go from it, nothing else may change.
  if kept ? tg_argv[0] then kept := kept || jsonb_build_object(tg_argv[0], to_jsonb(old) -> tg_argv[0]); end if;
  if kept is distinct from to_jsonb(old) or coalesce(to_jsonb(new) -> tg_argv[0], 'null') <> 'null'::jsonb then
    raise exception '% are never changed', tg_table_name using errcode = 'restrict_violation';
  end if;
  return new;
end $$;
--> statement-breakpoint
create trigger frozen before update on revisions for each row execute function refuse_change('published_by');
--> statement-breakpoint
create trigger frozen before update on run_events for each row execute function refuse_change('person_id');
--> statement-breakpoint
create trigger frozen before update on paint_optics for each row execute function refuse_change('none');
