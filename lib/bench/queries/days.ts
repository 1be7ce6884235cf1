import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listJarPages, listUsableInstruments } from './jar'
import { jarsToRead } from './jars'
import { getLabDay } from './lab-day'
import { getRevision } from './revision'
import { startPhoto } from './start-photo'
import { todaysBench } from './today'

export type BenchDays = Awaited<ReturnType<typeof benchDays>>

/** So many days' jars a tablet knows without network. */
const daysAhead = 7

/**
 * The Bench, and the page of every jar that is to be read today or in the coming days, in a number of statements that
 * does not grow with them: what a tablet takes along to where there is no network.
 */
export async function benchDays(db: Db, actor: Actor) {
  // Asked first: what changes while the rest is read is asked for again.
  const { revision, today } = await getRevision(db, actor)
  const day = await getLabDay(db)
  const rows = await jarsToRead(db)
    .select(startPhoto)
    .where('study.state', '=', 'running')
    .where('pj.state', 'in', ['due', 'resting'])
    .where('pull.dueOn', '<=', sql<string>`${day.today}::date + ${sql.lit(daysAhead)}`)
    .orderBy('pull.dueOn')
    .orderBy('jar.code')
    .execute()
  return {
    revision: `${today} ${revision}`,
    bench: await todaysBench(db, actor),
    instruments: await listUsableInstruments(db, day.today),
    jars: await listJarPages(db, rows, day),
  }
}
