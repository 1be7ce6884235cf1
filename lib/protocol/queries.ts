import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { ProtocolPlan } from '@/lib/protocol/schema'

/** Every protocol with its newest version and how many studies follow it. */
export async function listProtocols(db: Db, _actor: Actor) {
  return db
    .selectFrom('protocol')
    .innerJoin('protocolVersion', 'protocolVersion.protocolId', 'protocol.id')
    .innerJoin('person', 'person.id', 'protocol.createdBy')
    .select([
      'protocol.id',
      'protocol.code',
      'protocol.name',
      'protocol.createdAt',
      'person.initials as madeBy',
      'protocolVersion.id as versionId',
      'protocolVersion.number',
      'protocolVersion.state',
    ])
    .select((eb) => eb.ref('protocolVersion.plan').$castTo<ProtocolPlan>().as('plan'))
    .select((eb) =>
      eb
        .selectFrom('study')
        .innerJoin('protocolVersion as used', 'used.id', 'study.protocolVersionId')
        .whereRef('used.protocolId', '=', 'protocol.id')
        .select((count) => count.fn.countAll<number>().as('studies'))
        .as('studies'),
    )
    .where('protocolVersion.number', '=', (eb) =>
      eb
        .selectFrom('protocolVersion as newest')
        .whereRef('newest.protocolId', '=', 'protocol.id')
        .select((max) => max.fn.max('newest.number').as('number')),
    )
    .orderBy('protocol.code')
    .execute()
}
export type ProtocolRow = Awaited<ReturnType<typeof listProtocols>>[number]

/** A protocol with all its versions, newest first. */
export async function getProtocol(db: Db, _actor: Actor, code: string) {
  const protocol = await db
    .selectFrom('protocol')
    .select(['id', 'code', 'name', 'version', 'createdAt'])
    .where('code', '=', code)
    .executeTakeFirst()
  if (!protocol) throw refuse.notFound()
  const versions = await db
    .selectFrom('protocolVersion')
    .innerJoin('person', 'person.id', 'protocolVersion.createdBy')
    .leftJoin('person as approver', 'approver.id', 'protocolVersion.approvedBy')
    .select([
      'protocolVersion.id',
      'protocolVersion.number',
      'protocolVersion.state',
      'protocolVersion.note',
      'protocolVersion.version',
      'protocolVersion.createdAt',
      'protocolVersion.createdBy',
      'protocolVersion.approvedAt',
      'approver.name as approvedBy',
      'person.initials as madeBy',
    ])
    .select((eb) => eb.ref('protocolVersion.plan').$castTo<ProtocolPlan>().as('plan'))
    .where('protocolId', '=', protocol.id)
    .orderBy('protocolVersion.number', 'desc')
    .execute()
  const studies = await db
    .selectFrom('study')
    .innerJoin('protocolVersion', 'protocolVersion.id', 'study.protocolVersionId')
    .select(['study.code', 'study.title', 'study.state', 'protocolVersion.number'])
    .where('protocolVersion.protocolId', '=', protocol.id)
    .orderBy('study.code')
    .execute()
  return { ...protocol, versions, studies }
}
export type ProtocolPage = Awaited<ReturnType<typeof getProtocol>>

export async function findProtocolVersion(db: Db, id: string) {
  return db
    .selectFrom('protocolVersion')
    .innerJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .select([
      'protocolVersion.id',
      'protocolVersion.number',
      'protocolVersion.state',
      'protocolVersion.protocolId',
      'protocol.code',
      'protocol.name',
    ])
    .select((eb) => eb.ref('protocolVersion.plan').$castTo<ProtocolPlan>().as('plan'))
    .where('protocolVersion.id', '=', id)
    .executeTakeFirst()
}
