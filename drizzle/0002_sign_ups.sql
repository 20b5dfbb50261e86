CREATE TABLE "sign_ups" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"email" varchar(254) NOT NULL,
	"expires_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
grant select, insert, update, delete on sign_ups to countershade_app;
--> statement-breakpoint
alter table sign_ups enable row level security;
--> statement-breakpoint
create policy by_link on sign_ups using (token_hash = app_token_hash()) with check (token_hash = app_token_hash());
--> statement-breakpoint
-- What has ended goes, whoever it belonged to: done for all workshops at once, so past the walls, and only this.
create function sweep_ended() returns void language sql security definer set search_path = public as $$
  delete from sessions where expires_at < now();
  delete from password_resets where expires_at < now();
  delete from sign_ups where expires_at < now();
  delete from invitations where expires_at < now() - interval '30 days' or accepted_at < now() - interval '30 days';
  delete from idempotency_keys where created_at < now() - interval '2 days';
  delete from tries where window_ends_at < now();
$$;
--> statement-breakpoint
revoke all on function sweep_ended() from public;
--> statement-breakpoint
grant execute on function sweep_ended() to countershade_app;
