import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse, type AppError } from '@/lib/http/errors'
import { trailPageSize, type TrailQuery } from './schema'

/** Technicians read their own entries, formulators those of their studies too, QA and managers all. */
export async function listTrail(db: Db, actor: Actor, query: TrailQuery) {
  let rows = db
    .selectFrom('trail')
    .innerJoin('person', 'person.id', 'trail.actorId')
    .select([
      'trail.id',
      'trail.at',
      'trail.actorId',
      'person.name as actorName',
      'trail.tableName',
      'trail.rowId',
      'trail.operation',
      'trail.event',
      // A frozen case's content is a hundred times the rest of its row; its hash stands beside it.
      sql<unknown>`trail.before - 'content'`.as('before'),
      sql<unknown>`trail.after - 'content'`.as('after'),
      'trail.reason',
      'trail.requestId',
      'trail.isShifted',
    ])
    .where(readableBy(actor))
    .orderBy('trail.id', 'desc')
    .limit(trailPageSize + 1)
  if (query.table) rows = rows.where('trail.tableName', '=', query.table)
  if (query.rowId) rows = rows.where('trail.rowId', '=', query.rowId)
  if (query.actorId) rows = rows.where('trail.actorId', '=', query.actorId)
  if (query.studyId)
    rows = rows.where(
      sql<SqlBool>`(coalesce(trail.after, trail.before) ->> 'study_id' = ${query.studyId}
        or (trail.table_name = 'study' and trail.row_id = ${query.studyId}))`,
    )
  if (query.before) rows = rows.where('trail.id', '<', query.before)
  const found = await rows.execute()
  const entries = found.slice(0, trailPageSize)
  return { entries, next: found.length > trailPageSize ? (entries.at(-1)?.id ?? null) : null }
}

export type TrailPage = Awaited<ReturnType<typeof listTrail>>

function readableBy(actor: Actor) {
  if (actor.roles.includes('qa') || actor.roles.includes('manager')) return sql<SqlBool>`true`
  const own = sql<SqlBool>`trail.actor_id = ${actor.personId}`
  if (!actor.roles.includes('formulator')) return own
  return sql<SqlBool>`(${own} or coalesce(trail.after, trail.before) ->> 'study_id' in
      (select id::text from study where created_by = ${actor.personId})
    or (trail.table_name = 'study' and trail.row_id in
      (select id::text from study where created_by = ${actor.personId})))`
}

/**
 * After `update … where version = …`: the row, or the refusal that says who changed it meanwhile.
 * `expectOne(trx, updated, { table: 'formula', id, thing: 'this formula' })`
 */
export async function expectOne<T>(
  db: Db,
  row: T | undefined,
  about: { table: string; id: string; thing: string },
): Promise<T> {
  if (row !== undefined) return row
  throw await staleOrMissing(db, about)
}

async function staleOrMissing(
  db: Db,
  { table, id, thing }: { table: string; id: string; thing: string },
): Promise<AppError> {
  const last = await db
    .selectFrom('trail')
    .innerJoin('person', 'person.id', 'trail.actorId')
    .select(['person.name', 'trail.at', 'trail.before', 'trail.after', 'trail.operation'])
    .select((eb) => eb.selectFrom('lab').select('timeZone').as('timeZone'))
    .where('trail.tableName', '=', table)
    .where('trail.rowId', '=', id)
    .orderBy('trail.id', 'desc')
    .limit(1)
    .executeTakeFirst()
  if (!last || last.operation === 'delete') return refuse.notFound()
  const changes = differences(last.before, last.after)
  return refuse.stale(
    `${last.name} changed ${thing} ${formatInstant(last.at, last.timeZone ?? 'UTC')}, while you had it open. Reload to see the change, then save yours again.`,
    { changedBy: last.name, changedAt: last.at, changes },
  )
}

function differences(before: unknown, after: unknown): { field: string; from: unknown; to: unknown }[] {
  const was = (before ?? {}) as Record<string, unknown>
  const became = (after ?? {}) as Record<string, unknown>
  return Object.keys(became)
    .filter((field) => field !== 'version' && JSON.stringify(was[field]) !== JSON.stringify(became[field]))
    .map((field) => ({ field: camel(field), from: was[field] ?? null, to: became[field] ?? null }))
}

const camel = (name: string) => name.replace(/_([a-z0-9])/g, (_, letter: string) => letter.toUpperCase())

// "on 2 Mar 2026 at 14:02", in the lab's zone.
function formatInstant(instant: string, timeZone: string): string {
  const part = (options: Intl.DateTimeFormatOptions) =>
    new Intl.DateTimeFormat('en-GB', { timeZone, ...options }).format(new Date(instant))
  const month = part({ month: 'short' }).slice(0, 3)
  return `on ${part({ day: 'numeric' })} ${month} ${part({ year: 'numeric' })} at ${part({ hour: '2-digit', minute: '2-digit' })}`
}
