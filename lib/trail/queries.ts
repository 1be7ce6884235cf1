import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse, type AppError } from '@/lib/http/errors'
import { getLab } from '@/lib/lab/queries'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { trailLines, type TrailLine } from './rules/lines'
import { tableOf } from './rules/list'

type Query = ListQuery<'what' | 'study' | 'by' | 'from' | 'to'>

/** One page of the record in words, the latest written first. It only grows, so it is not counted. */
export async function listTrail(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, await trailSource(db, actor, query), query)
  return { ...page, choices: await listChoices(db, actor) }
}

export type TrailPage = Awaited<ReturnType<typeof listTrail>>

/** Technicians read their own entries, formulators those of their studies too, QA and managers all. */
export async function trailSource(db: Db, actor: Actor, { q, filters }: Query): Promise<Source<TrailLine>> {
  const { what, study, by, from, to } = filters
  const typed = likeTyped(q)
  const names = await namesOf(db)
  const lab = await getLab(db)
  return {
    from: sql`trail`,
    where: [
      readableBy(actor),
      ...(what ? [sql<SqlBool>`trail.table_name = ${tableOf(what) ?? what}`] : []),
      ...(study ? [isOfStudy(study)] : []),
      ...(by ? [sql<SqlBool>`trail.actor_id in (select id from person where name = ${by})`] : []),
      ...onDays(sql`trail.at`, from, to),
      ...(q
        ? [
            sql<SqlBool>`(trail.reason ilike ${typed} or trail.event ilike ${typed}
              or coalesce(trail.after, trail.before) ->> 'code' ilike ${typed}
              or coalesce(trail.after, trail.before) ->> 'name' ilike ${typed}
              or coalesce(trail.after, trail.before) ->> 'title' ilike ${typed}
              or coalesce(trail.after, trail.before) ->> 'inci_name' ilike ${typed})`,
          ]
        : []),
    ],
    id: sql`trail.id`,
    idKind: 'bigint',
    sorts: { entry: { by: sql`trail.id`, kind: 'number' } },
    rows: async (ids) => trailLines(await entriesOf(db, ids), lab.timeZone, names),
    idOf: (line) => String(line.id),
    isUncounted: true,
  }
}

function isOfStudy(code: string) {
  const id = sql`(select id::text from study where code = ${code})`
  return sql<SqlBool>`(coalesce(trail.after, trail.before) ->> 'study_id' = ${id}
    or (trail.table_name = 'study' and trail.row_id = ${id}))`
}

async function namesOf(db: Db): Promise<Map<string, string>> {
  const people = await db.selectFrom('person').select(['id', 'name']).execute()
  return new Map(people.map((person) => [person.id, person.name]))
}

async function entriesOf(db: Db, ids: string[]) {
  return db
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
      'trail.isShifted',
    ])
    .where(sql<SqlBool>`trail.id = any(${ids}::bigint[])`)
    .execute()
}

export type TrailEntry = Awaited<ReturnType<typeof entriesOf>>[number]

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
