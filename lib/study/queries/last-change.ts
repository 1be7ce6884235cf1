import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'

type Watched = 'study' | 'protocol_version' | 'station' | 'instrument' | 'jar'

/** Who changed a row last, and when, for a refusal that says so. */
export async function findLastChange(db: Db, table: Watched, rowId: string) {
  return db
    .selectFrom('trail')
    .innerJoin('person', 'person.id', 'trail.actorId')
    .select(['person.name', 'person.initials', 'trail.at', 'trail.reason'])
    .where('trail.tableName', '=', table)
    .where('trail.rowId', '=', rowId)
    .orderBy('trail.id', 'desc')
    .limit(1)
    .executeTakeFirst()
}

/** The refusal of an edit that someone else came before: what, by whom, and what stands now. */
export async function staleEdit(db: Db, table: Watched, rowId: string, what: string, current: unknown) {
  const change = await findLastChange(db, table, rowId)
  const who = change ? `${change.name} has changed ${what}` : `${what} has changed`
  return refuse.stale(`${who} since you opened it. Nothing of yours was saved; look at what stands now.`, {
    current,
    ...(change ? { changedBy: change.name, changedAt: change.at } : {}),
  })
}
