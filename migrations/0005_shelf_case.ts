import { sql, type Kysely } from 'kysely'

export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    create table shelf_case (
      id uuid primary key,
      code text not null unique,
      study_id uuid not null references study (id),
      kind text not null check (kind in ('real time','provisional')),
      state text not null default 'drafting'
        check (state in ('drafting','put forward','sent back','signed','superseded')),
      proposed_months integer check (proposed_months >= 0),
      storage_statement text not null default '',
      why_fewer text not null default '',
      study_station_id uuid not null references study_station (id),
      provisional_rule text not null default '',
      review_on date,
      period_after_opening_months integer check (period_after_opening_months > 0),
      period_after_opening_evidence text not null default '',
      -- RFC 8785 canonical bytes, frozen when put forward; never jsonb, whose text is not stable.
      content text,
      content_sha256 text check (content_sha256 ~ '^[0-9a-f]{64}$'),
      put_forward_by uuid references person (id),
      put_forward_at timestamptz,
      supersedes_id uuid references shelf_case (id),
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now(),
      check ((content is null) = (content_sha256 is null))
    );
    create index shelf_case_study on shelf_case (study_id);

    create table signature (
      id uuid primary key,
      shelf_case_id uuid not null references shelf_case (id),
      person_id uuid not null references person (id),
      person_name text not null,
      meaning text not null check (meaning in ('approve','send back')),
      comment text not null default '',
      content_sha256 text not null check (content_sha256 ~ '^[0-9a-f]{64}$'),
      zone text not null,
      signed_at timestamptz not null default app_now(),
      -- SHA-256 over the canonical signature (case, person, name, meaning, time, content hash).
      signature_sha256 text not null check (signature_sha256 ~ '^[0-9a-f]{64}$')
    );
    create index signature_case on signature (shelf_case_id);

    -- What has been put forward is frozen for everybody: only state and version may still move on.
    create function keep_frozen_case() returns trigger language plpgsql as $$
    begin
      if old.content is not null and (new.content is distinct from old.content
          or new.content_sha256 is distinct from old.content_sha256
          or new.proposed_months is distinct from old.proposed_months
          or new.storage_statement is distinct from old.storage_statement) then
        raise exception 'A case that was put forward is frozen.' using errcode = '42501';
      end if;
      return new;
    end $$;
    create trigger keep_frozen before update on shelf_case for each row execute function keep_frozen_case();
  `.execute(db)
  await sql`
    select add_trail('shelf_case'), grant_app('shelf_case', 'select, insert, update'),
      add_trail('signature'), grant_app('signature', 'select, insert'), append_only('signature')
  `.execute(db)
}
