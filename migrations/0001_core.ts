import { sql, type Kysely } from 'kysely'

// The floor everything else stands on: the clock, the trail, people and what lets them in.
export async function up(db: Kysely<any>): Promise<void> {
  await clock(db)
  await people(db)
  await door(db)
  await trail(db)
  await seal(db)
  await system(db)
}

async function clock(db: Kysely<any>): Promise<void> {
  await sql`
    -- Milliseconds, because that is what JavaScript keeps: an instant read and sent back is still equal.
    -- session_user cannot be changed with SET ROLE, so only a login of the seeding role may shift it.
    create function app_clock_shift() returns interval language plpgsql stable as $$
    declare
      shift text := nullif(current_setting('app.clock_shift', true), '');
    begin
      if shift is null then return null; end if;
      if not pg_has_role(session_user, 'stillstand_seed', 'member') then
        raise exception 'Only the seeding role may shift the clock.' using errcode = '42501';
      end if;
      return shift::interval;
    end $$;

    create function app_now() returns timestamptz language sql stable as $$
      select date_trunc('milliseconds', now() + coalesce(app_clock_shift(), interval '0'))
    $$;

    create function app_actor() returns uuid language sql stable as $$
      -- On a pooled connection an ended transaction's setting comes back as an empty string.
      select nullif(current_setting('app.actor_id', true), '')::uuid
    $$;

    create function grant_app(table_name text, privileges text) returns void language plpgsql as $$
    begin
      execute format('grant %s on %I to stillstand_app, stillstand_seed', privileges, table_name);
    end $$;
  `.execute(db)
}

async function people(db: Kysely<any>): Promise<void> {
  await sql`
    create table lab (
      id uuid primary key,
      name text not null check (length(btrim(name)) > 0),
      time_zone text not null,
      settings jsonb not null default '{}',
      demo_filled_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );
    -- One deployment serves one lab.
    create unique index lab_only_one on lab ((true));

    create table client (
      id uuid primary key,
      name text not null check (length(btrim(name)) > 0),
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );
    create unique index client_name on client (lower(name));

    create table person (
      id uuid primary key,
      email text not null check (length(btrim(email)) > 0),
      name text not null check (length(btrim(name)) > 0),
      initials text not null check (length(btrim(initials)) > 0),
      roles text[] not null default '{}'
        check (roles <@ array['technician','formulator','qa','manager','client']),
      client_id uuid references client (id),
      is_active boolean not null default true,
      is_system boolean not null default false,
      is_demo boolean not null default false,
      version integer not null default 1,
      created_at timestamptz not null default app_now(),
      check (not ('client' = any (roles)) or (cardinality(roles) = 1 and client_id is not null))
    );
    -- People are deactivated, never deleted, so an address names one person for ever.
    create unique index person_email on person (lower(email));
  `.execute(db)
}

async function door(db: Kysely<any>): Promise<void> {
  await sql`
    create table password (
      person_id uuid primary key references person (id),
      hash text not null,
      changed_at timestamptz not null default app_now()
    );

    -- id is the SHA-256 of the cookie, so that reading the table lets nobody in.
    create table session (
      id text primary key,
      user_id uuid not null references person (id),
      expires_at timestamptz not null,
      created_at timestamptz not null default now(),
      is_demo boolean not null default false
    );
    create index session_user_id on session (user_id);

    create table token (
      id uuid primary key,
      kind text not null check (kind in ('invitation','reset','setup')),
      person_id uuid references person (id),
      hash text not null unique,
      expires_at timestamptz not null,
      used_at timestamptz,
      created_at timestamptz not null default app_now()
    );
    create index token_person on token (person_id);

    create table idempotency_answer (
      actor_id uuid not null references person (id),
      key text not null,
      route text not null,
      body_hash text not null,
      status integer,
      answer text,
      at timestamptz not null default now(),
      primary key (actor_id, key)
    );
    create index idempotency_answer_at on idempotency_answer (at);

    -- The shape that rate-limiter-flexible expects.
    create table rate_limit (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    );
  `.execute(db)
}

async function trail(db: Kysely<any>): Promise<void> {
  await sql`
    create table trail (
      id bigint generated always as identity primary key,
      at timestamptz not null default app_now(),
      actor_id uuid not null references person (id),
      table_name text,
      row_id text,
      operation text not null check (operation in ('insert','update','delete','event')),
      event text,
      before jsonb,
      after jsonb,
      reason text,
      request_id text,
      is_shifted boolean not null default (app_clock_shift() is not null),
      check ((operation = 'event') = (event is not null))
    );
    create index trail_row on trail (table_name, row_id, id);
    create index trail_actor on trail (actor_id, id);
    create index trail_study on trail ((coalesce(after, before) ->> 'study_id'), id);

    -- The one list of what leaves no trail; a test holds it against the tables there are.
    create table trail_exemption (
      table_name text primary key,
      why text not null
    );
    create function trail_exempt(table_name text, why text) returns void language sql as $$
      insert into trail_exemption values (table_name, why)
    $$;

    -- UTC, because a session's zone would show in the text of instants.
    create function write_trail() returns trigger language plpgsql
      security definer set search_path = pg_catalog, public, pg_temp set timezone = 'UTC' as $$
    declare
      was jsonb := case when tg_op <> 'INSERT' then to_jsonb(old) end;
      became jsonb := case when tg_op <> 'DELETE' then to_jsonb(new) end;
      named text;
    begin
      if public.app_actor() is null then
        raise exception 'A change of % needs an actor.', tg_table_name using errcode = 'P0001';
      end if;
      -- A row written back as it was is no change.
      if tg_op = 'UPDATE' and was = became then return null; end if;
      select string_agg(coalesce(became, was) ->> column_name, '/' order by place) into named
        from unnest(tg_argv) with ordinality as key (column_name, place);
      insert into public.trail (actor_id, table_name, row_id, operation, before, after, reason, request_id)
      values (public.app_actor(), tg_table_name, named, lower(tg_op), was, became,
        nullif(current_setting('app.reason', true), ''), nullif(current_setting('app.request_id', true), ''));
      return null;
    end $$;

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      if current_user = (select pg_get_userbyid(relowner) from pg_class where oid = tg_relid) then
        return coalesce(new, old);
      end if;
      raise exception '% is append-only.', tg_table_name using errcode = '42501';
    end $$;

    create function append_only(table_name text) returns void language plpgsql as $$
    begin
      execute format('create trigger append_only before update or delete on %I
        for each row execute function refuse_change()', table_name);
      execute format('create trigger append_only_whole before truncate on %I
        for each statement execute function refuse_change()', table_name);
    end $$;

    create function add_trail(table_name text) returns void language plpgsql as $$
    declare
      keys text;
    begin
      select string_agg(quote_literal(a.attname), ', ' order by array_position(i.indkey::int2[], a.attnum)) into keys
        from pg_index i join pg_attribute a on a.attrelid = i.indrelid and a.attnum = any (i.indkey)
        where i.indrelid = table_name::regclass and i.indisprimary;
      execute format('create trigger trail after insert or update or delete on %I
        for each row execute function write_trail(%s)', table_name, keys);
    end $$;

    -- What happened without a row of its own: a sign-in, an export, a refused signature.
    create function record_event(event text, about_table text, about_id text, detail jsonb, reason text)
      returns void language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $$
    begin
      if public.app_actor() is null then
        raise exception 'An event needs an actor.' using errcode = 'P0001';
      end if;
      insert into public.trail (actor_id, table_name, row_id, operation, event, after, reason, request_id)
      values (public.app_actor(), about_table, about_id, 'event', event, detail,
        coalesce(reason, nullif(current_setting('app.reason', true), '')),
        nullif(current_setting('app.request_id', true), ''));
    end $$;
    revoke execute on function record_event(text, text, text, jsonb, text) from public;
    grant execute on function record_event(text, text, text, jsonb, text) to stillstand_app, stillstand_seed;
  `.execute(db)
}

async function seal(db: Kysely<any>): Promise<void> {
  await sql`
    create table trail_seal (
      number bigint primary key,
      trail_id bigint not null unique,
      hash text not null,
      sealed_at timestamptz not null default now()
    );

    create function trail_row_text(entry trail) returns text language sql stable
      set timezone = 'UTC' as $$ select to_jsonb(entry)::text $$;

    create function chain_hash(previous text, content text) returns text language sql immutable as $$
      select encode(sha256(convert_to(previous || '|' || content, 'UTF8')), 'hex')
    $$;

    -- A serial number is not commit order. The lock waits until every writer that holds a number has
    -- ended, so what is at or below the highest sealed id is complete and a later row there is foreign.
    create function seal_trail() returns integer language plpgsql
      security definer set search_path = pg_catalog, public, pg_temp as $$
    declare
      entry public.trail;
      last_number bigint;
      last_hash text;
      sealed_to bigint;
      sealed integer := 0;
    begin
      set local lock_timeout = '2s';
      lock table public.trail_seal in exclusive mode;
      lock table public.trail in share mode;
      select number, hash into last_number, last_hash from public.trail_seal order by number desc limit 1;
      select coalesce(max(trail_id), 0) into sealed_to from public.trail_seal;
      last_number := coalesce(last_number, 0);
      last_hash := coalesce(last_hash, '');
      for entry in select * from public.trail where id > sealed_to order by id loop
        last_number := last_number + 1;
        last_hash := public.chain_hash(last_hash, public.trail_row_text(entry));
        insert into public.trail_seal (number, trail_id, hash) values (last_number, entry.id, last_hash);
        sealed := sealed + 1;
      end loop;
      return sealed;
    end $$;
    revoke execute on function seal_trail() from public;
    grant execute on function seal_trail() to stillstand_app, stillstand_seed;
  `.execute(db)
}

async function system(db: Kysely<any>): Promise<void> {
  await sql`
    select trail_exempt('session', 'who came and went is on the trail as events'),
      trail_exempt('password', 'a hash has no place in a record that people read; its change is an event'),
      trail_exempt('token', 'hashed one-time links; their use is an event'),
      trail_exempt('idempotency_answer', 'first answers kept for repeated requests'),
      trail_exempt('rate_limit', 'counters of attempts'),
      trail_exempt('trail', 'the trail itself'),
      trail_exempt('trail_seal', 'hashes over the trail'),
      trail_exempt('trail_exemption', 'this list, written by migrations alone'),
      trail_exempt('kysely_migration', 'the migrator''s own'),
      trail_exempt('kysely_migration_lock', 'the migrator''s own');

    select append_only('trail'), append_only('trail_seal');
    select add_trail('lab'), grant_app('lab', 'select, insert, update'),
      add_trail('client'), grant_app('client', 'select, insert, update'),
      add_trail('person'), grant_app('person', 'select, insert, update'),
      grant_app('password', 'select, insert, update'),
      grant_app('session', 'select, insert, update, delete'),
      grant_app('token', 'select, insert, update, delete'),
      grant_app('idempotency_answer', 'select, insert, update, delete'),
      grant_app('rate_limit', 'select, insert, update, delete'),
      grant_app('trail', 'select'), grant_app('trail_seal', 'select'), grant_app('trail_exemption', 'select'),
      grant_app('kysely_migration', 'select');

    -- Its own first trail row names itself.
    select set_config('app.actor_id', '00000000-0000-7000-8000-000000000001', true);
    insert into person (id, email, name, initials, is_system)
      values ('00000000-0000-7000-8000-000000000001', 'system@stillstand.invalid', 'Stillstand', 'ST', true);
  `.execute(db)
}
