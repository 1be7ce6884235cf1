import { sql, type Kysely } from 'kysely'

// The measuring copy of a photo: made by the browser from the original, upright, without EXIF, at most 2,000 px.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    create table photo_copy (
      photo_id uuid primary key references photo (id),
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      bytes integer not null,
      width integer not null,
      height integer not null,
      made_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now()
    );
    select add_trail('photo_copy'), grant_app('photo_copy', 'select, insert'), append_only('photo_copy');
  `.execute(db)
}
