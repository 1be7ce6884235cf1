import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { findLab } from '@/lib/lab/queries'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'

type Query = ListQuery<'role' | 'client' | 'account'>

/** One page of the people, and how many keep the notebook. */
export async function listPeople(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, personSource(db, actor, query), query)
  const { rows } = await sql<{ active: number; waiting: number }>`
    select count(*) filter (where is_active) as active,
      count(*) filter (where is_active and not is_demo and password.person_id is null) as waiting
    from person left join password on password.person_id = person.id where not is_system
  `.execute(db)
  return { ...page, counts: rows[0]!, choices: await listChoices(db, actor) }
}
export type PeoplePage = Awaited<ReturnType<typeof listPeople>>

export function personSource(db: Db, _actor: Actor, { q, filters }: Query): Source<PersonRow> {
  const { role, client, account } = filters
  const typed = likeTyped(q)
  return {
    from: sql`person left join client on client.id = person.client_id`,
    where: [
      sql<SqlBool>`not person.is_system`,
      ...(q
        ? [
            sql<SqlBool>`(person.name ilike ${typed} or person.email ilike ${typed} or person.initials ilike ${typed}
              or client.name ilike ${typed})`,
          ]
        : []),
      ...(role ? [sql<SqlBool>`${role} = any (person.roles)`] : []),
      ...(client ? [sql<SqlBool>`client.name = ${client}`] : []),
      ...(account ? [sql<SqlBool>`person.is_active = ${account === 'open'}`] : []),
    ],
    id: sql`person.id`,
    idKind: 'uuid',
    sorts: {
      initials: naturally('person.initials'),
      name: naturally('person.name'),
      email: naturally('person.email'),
      client: naturally('client.name'),
      added: { by: sql`person.created_at`, kind: 'instant' },
    },
    rows: (ids) =>
      selectPeople(db)
        .where(sql<SqlBool>`person.id = any(${ids}::uuid[])`)
        .execute(),
    idOf: (person) => person.id,
  }
}

export type PersonRow = Awaited<ReturnType<ReturnType<typeof selectPeople>['execute']>>[number]

export async function getPerson(db: Db, _actor: Actor, id: string): Promise<PersonRow> {
  const person = await selectPeople(db).where('person.id', '=', id).executeTakeFirst()
  if (!person) throw refuse.notFound()
  return person
}

/** For the sign-in page. Empty unless filling the demo has left its mark. */
export async function listDemoPeople(db: Db) {
  const lab = await findLab(db)
  if (!lab?.demoFilledAt) return []
  return db
    .selectFrom('person')
    .leftJoin('client', 'client.id', 'person.clientId')
    .select(['person.id', 'person.name', 'person.initials', 'person.roles', 'client.name as clientName'])
    .where('person.isDemo', '=', true)
    .where('person.isActive', '=', true)
    .orderBy('person.createdAt')
    .orderBy('person.id')
    .execute()
}

export type DemoPerson = Awaited<ReturnType<typeof listDemoPeople>>[number]

function selectPeople(db: Db) {
  return db
    .selectFrom('person')
    .leftJoin('client', 'client.id', 'person.clientId')
    .leftJoin('password', 'password.personId', 'person.id')
    .select([
      'person.id',
      'person.email',
      'person.name',
      'person.initials',
      'person.roles',
      'person.clientId',
      'client.name as clientName',
      'person.isActive',
      'person.isDemo',
      'person.version',
      'person.createdAt',
    ])
    .select((eb) => eb('password.personId', 'is not', null).as('hasPassword'))
    .where('person.isSystem', '=', false)
}
