import { sql, type RawBuilder } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import { may, type Permission } from '@/lib/auth/permissions'
import type { Db } from '@/lib/db/client'
import { studiesOf } from '@/lib/study/queries/scope'

export type FoundKind =
  'formula' | 'batch' | 'study' | 'jar' | 'ingredient' | 'protocol' | 'case' | 'station' | 'instrument'

/** One thing that the typed words name, and where it is shown. */
export type Found = { kind: FoundKind; code: string; name: string; href: string }

type Source = {
  kind: FoundKind
  permission: Permission
  /** Rows of code, name, and what the address is made from. */
  rows: (actor: Actor) => RawBuilder<unknown>
  href: (row: { code: string; of: string }) => string
  /** The name beside it is another thing's, and found as that. */
  isByCodeAlone?: boolean
}

const part = encodeURIComponent
const mostOfAKind = 6

const sources: Source[] = [
  {
    kind: 'study',
    permission: 'study.read',
    rows: (actor) =>
      sql`select study.code, study.title as name, study.code as of from study where ${studiesOf(actor)}`,
    href: ({ code }) => `/studies/${part(code)}`,
  },
  {
    kind: 'formula',
    permission: 'formula.read',
    rows: () => sql`select code, name, code as of from formula where not is_reference`,
    href: ({ code }) => `/formulas/${part(code)}`,
  },
  {
    kind: 'batch',
    permission: 'batch.read',
    rows: () => sql`
      select batch.code, formula.name, batch.code as of from batch
      join formula_version on formula_version.id = batch.formula_version_id
      join formula on formula.id = formula_version.formula_id`,
    href: ({ code }) => `/batches/${part(code)}`,
  },
  {
    kind: 'jar',
    permission: 'reading.read',
    rows: () => sql`
      select jar.code, study.code || ' ' || study.title as name, study.code as of
      from jar join study on study.id = jar.study_id`,
    href: ({ code, of }) => `/studies/${part(of)}/jars?q=${part(code)}`,
    isByCodeAlone: true,
  },
  {
    kind: 'ingredient',
    permission: 'formula.read',
    rows: () => sql`select inci_name as code, function as name, inci_name as of from ingredient`,
    href: ({ code }) => `/ingredients?q=${part(code)}`,
  },
  {
    kind: 'protocol',
    permission: 'protocol.read',
    rows: () => sql`select code, name, code as of from protocol`,
    href: ({ code }) => `/protocols/${part(code)}`,
  },
  {
    kind: 'case',
    permission: 'case.read',
    rows: () => sql`
      select shelf_case.code, study.title as name, shelf_case.code as of
      from shelf_case join study on study.id = shelf_case.study_id`,
    href: ({ code }) => `/cases/${part(code)}`,
  },
  {
    kind: 'station',
    permission: 'station.read',
    rows: () => sql`select name as code, kind as name, id::text as of from station`,
    href: ({ of }) => `/stations/${part(of)}`,
  },
  {
    kind: 'instrument',
    permission: 'instrument.read',
    rows: () => sql`select code, name, id::text as of from instrument`,
    href: ({ of }) => `/instruments/${part(of)}`,
  },
]

/**
 * What a person may see that bears the typed words in its code or name, in one statement: codes that are the words
 * first, then those that begin with them, then the rest; a few of each kind.
 */
export async function findByName(db: Db, actor: Actor, q: string): Promise<Found[]> {
  const allowed = sources.filter((source) => may(actor, source.permission))
  if (q === '' || allowed.length === 0) return []
  const typed = q.toLowerCase().replace(/[\\%_]/g, '\\$&')
  const rank = sql`case when lower(code) = ${q.toLowerCase()} then 0
    when lower(code) like ${`${typed}%`} then 1 when lower(name) like ${`${typed}%`} then 2 else 3 end`
  const parts = allowed.map(
    ({ kind, rows, isByCodeAlone = false }, order) => sql`
      (select ${sql.lit(kind)} as kind, ${sql.lit(order)} as place, found.code, found.name, found.of, ${rank} as rank
       from (${rows(actor)}) as found
       where lower(found.code) like ${`%${typed}%`}
         or (${sql.lit(!isByCodeAlone)} and lower(found.name) like ${`%${typed}%`})
       order by rank, found.code limit ${sql.lit(mostOfAKind)})`,
  )
  const { rows } = await sql<{ kind: FoundKind; code: string; name: string; of: string }>`
    select kind, code, name, of from (${sql.join(parts, sql` union all `)}) as every_kind
    order by rank, place, code
  `.execute(db)
  return rows.map((row) => ({
    kind: row.kind,
    code: row.code,
    name: row.name,
    href: allowed.find((source) => source.kind === row.kind)!.href(row),
  }))
}
