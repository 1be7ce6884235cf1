import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import type { ProtocolPlan } from '@/lib/protocol/schema'

type Query = ListQuery<'state' | 'use' | 'by' | 'from' | 'to'>

/** One page of the protocols, and how many of all there are and are followed. */
export async function listProtocolPage(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, protocolSource(db, actor, query), query)
  const { rows } = await sql<{ all: number; followed: number }>`
    select count(*) as "all", count(*) filter (where ${studiesOfProtocol} > 0) as followed from protocol
  `.execute(db)
  return { ...page, counts: rows[0]!, choices: await listChoices(db, actor) }
}
export type ProtocolsPage = Awaited<ReturnType<typeof listProtocolPage>>

const studiesOfProtocol = sql`(select count(*) from study join protocol_version used
  on used.id = study.protocol_version_id where used.protocol_id = protocol.id)`

export function protocolSource(db: Db, _actor: Actor, { q, filters }: Query): Source<ProtocolRow> {
  const { state, use, by, from, to } = filters
  const typed = likeTyped(q)
  return {
    from: sql`protocol join person on person.id = protocol.created_by
      join protocol_version newest on newest.protocol_id = protocol.id and newest.number =
        (select max(number) from protocol_version where protocol_id = protocol.id)`,
    where: [
      ...(q ? [sql<SqlBool>`(protocol.code ilike ${typed} or protocol.name ilike ${typed})`] : []),
      ...(state ? [sql<SqlBool>`newest.state = ${state}`] : []),
      ...(use ? [sql<SqlBool>`(${studiesOfProtocol} > 0) = ${use === 'followed'}`] : []),
      ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
      ...onDays(sql`protocol.created_at`, from, to),
    ],
    id: sql`protocol.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('protocol.code'),
      name: naturally('protocol.name'),
      span: { by: sql`(newest.plan ->> 'endWeeks')::numeric`, kind: 'number' },
      state: { by: sql`newest.state`, kind: 'text' },
      studies: { by: studiesOfProtocol, kind: 'number' },
      by: naturally('person.initials'),
      begun: { by: sql`protocol.created_at`, kind: 'instant' },
    },
    rows: (ids) =>
      protocols(db)
        .where(sql<SqlBool>`protocol.id = any(${ids}::uuid[])`)
        .execute(),
    idOf: (row) => row.id,
  }
}

/** Every protocol, for a choice among them. */
export async function listProtocols(db: Db, _actor: Actor) {
  return protocols(db)
    .orderBy(sql`protocol.code collate natural_order`)
    .execute()
}

/** Protocols with their newest version and how many studies follow them. */
function protocols(db: Db) {
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
