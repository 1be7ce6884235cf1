import { sql, type Kysely } from 'kysely'

/** A spare jar that was called for by a save that is undone is called for no more; the trail keeps that it was. */
export async function up(db: Kysely<any>): Promise<void> {
  await sql`select grant_app('pull_jar', 'delete')`.execute(db)
}
