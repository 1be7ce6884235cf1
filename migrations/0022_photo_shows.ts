import { sql, type Kysely } from 'kysely'

// What is on a photo of a jar: the jar as it stands, its fill beside a grey card, or drops under the microscope.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table photo add column shows text not null default 'jar' check (shows in ('jar', 'colour', 'droplets'));
    create index photo_jar on photo (jar_id, taken_at);
  `.execute(db)
}
