import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { findLab } from '@/lib/lab/queries'

export async function listPeople(db: Db, _actor: Actor) {
  return selectPeople(db).orderBy('person.name').execute()
}

export type PersonRow = Awaited<ReturnType<typeof listPeople>>[number]

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
