import { sql, type RawBuilder, type SqlBool } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'

type Query = ListQuery<'state' | 'kind' | 'client' | 'by' | 'from' | 'to'>

/** One page of the cases, and what the headline tells of all of them. */
export async function listCases(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, caseSource(db, actor, query), query)
  const { rows } = await sql<{ all: number; waiting: number; signed: number; first: string | null }>`
    select count(*) as "all", count(*) filter (where c.state = 'put forward') as waiting,
      count(*) filter (where c.state = 'signed') as signed,
      min(c.code) filter (where c.state = 'put forward') as first
    from shelf_case c join study on study.id = c.study_id where ${casesOf(actor)}
  `.execute(db)
  return { ...page, counts: rows[0]!, choices: await listChoices(db, actor) }
}
export type CasesPage = Awaited<ReturnType<typeof listCases>>

/** All cases for the laboratory; for a client only the signed ones of its shared studies. */
export function casesOf(actor: Actor): RawBuilder<SqlBool> {
  if (!isClientOnly(actor)) return sql<SqlBool>`true`
  return sql<SqlBool>`(c.state in ('signed', 'superseded') and study.is_shared
    and study.client_id = ${actor.clientId}::uuid)`
}

export function caseSource(db: Db, actor: Actor, { q, filters }: Query): Source<CaseRow> {
  const { state, kind, client, by, from, to } = filters
  const typed = likeTyped(q)
  return {
    from: sql`shelf_case c join study on study.id = c.study_id left join client on client.id = study.client_id
      left join person on person.id = c.put_forward_by`,
    where: [
      casesOf(actor),
      ...(q
        ? [
            sql<SqlBool>`(c.code ilike ${typed} or study.code ilike ${typed} or study.title ilike ${typed}
              or client.name ilike ${typed} or c.storage_statement ilike ${typed})`,
          ]
        : []),
      ...(state ? [sql<SqlBool>`c.state = ${state}`] : []),
      ...(kind ? [sql<SqlBool>`c.kind = ${kind}`] : []),
      ...(client ? [sql<SqlBool>`client.name = ${client}`] : []),
      ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
      ...onDays(sql`c.put_forward_at`, from, to),
    ],
    id: sql`c.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('c.code'),
      study: naturally('study.code'),
      months: { by: sql`c.proposed_months`, kind: 'number' },
      kind: { by: sql`c.kind`, kind: 'text' },
      state: { by: sql`c.state`, kind: 'text' },
      client: naturally('client.name'),
      putForward: { by: sql`c.put_forward_at`, kind: 'instant' },
      by: naturally('person.initials'),
      signed: {
        by: sql`(select max(signed_at) from signature where shelf_case_id = c.id and meaning = 'approve')`,
        kind: 'instant',
      },
    },
    rows: (ids) => caseRows(db, ids),
    idOf: (row) => row.id,
  }
}

async function caseRows(db: Db, ids: string[]) {
  return db
    .selectFrom('shelfCase as c')
    .innerJoin('study as s', 's.id', 'c.studyId')
    .leftJoin('client', 'client.id', 's.clientId')
    .leftJoin('person as p', 'p.id', 'c.putForwardBy')
    .select([
      'c.id',
      'c.code',
      'c.kind',
      'c.state',
      'c.proposedMonths',
      'c.storageStatement',
      'c.putForwardAt',
    ])
    .select(['s.code as studyCode', 's.title as studyTitle', 'p.initials as putForwardBy'])
    .select('client.name as clientName')
    .select((eb) =>
      eb
        .selectFrom('signature as g')
        .select((max) => max.fn.max('g.signedAt').as('signedAt'))
        .whereRef('g.shelfCaseId', '=', 'c.id')
        .where('g.meaning', '=', 'approve')
        .as('signedAt'),
    )
    .where(sql<SqlBool>`c.id = any(${ids}::uuid[])`)
    .execute()
}
export type CaseRow = Awaited<ReturnType<typeof caseRows>>[number]
