import { sql } from 'kysely'
import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { missingInPlan } from '@/lib/protocol/rules/faults'
import type { approvedVersion, ProtocolPlan } from '@/lib/protocol/schema'
import { expectOne } from '@/lib/trail/queries'

/**
 * QA approves a version as it stands, which locks it: from then on a study that starts on it may carry a shelf life.
 * Nobody approves what they wrote: authors are those whom the trail names for the plan, whatever their roles.
 */
export async function approveVersion(
  trx: Trx,
  actor: Actor,
  address: { code: string; number: number },
  input: z.output<typeof approvedVersion>,
  now: string,
) {
  const found = await trx
    .selectFrom('protocolVersion')
    .innerJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .select(['protocolVersion.id', 'protocolVersion.state', 'protocolVersion.version'])
    .select(['protocolVersion.createdBy', 'protocolVersion.approvedBy'])
    .select((eb) => eb.ref('protocolVersion.plan').$castTo<ProtocolPlan>().as('plan'))
    .where('protocol.code', '=', address.code)
    .where('protocolVersion.number', '=', address.number)
    .forUpdate()
    .executeTakeFirst()
  if (!found) throw refuse.notFound()
  const name = `version ${address.number} of ${address.code}`
  const what = `V${name.slice(1)}`
  if (found.state === 'approved') throw refuse.conflict(`${what} is already approved. Nothing is left to do.`)
  if (found.version !== input.version) {
    await expectOne(trx, undefined, { table: 'protocol_version', id: found.id, thing: name })
  }
  if (found.createdBy === actor.personId || (await hasWritten(trx, actor, found.id))) {
    throw refuse
      .forbidden(`You wrote on ${name}, so someone else of QA approves it.`)
      .onTrail({ event: 'approval refused', table: 'protocol_version', id: found.id })
  }
  const missing = missingInPlan(found.plan)
  if (missing) throw refuse.conflict(`${what} cannot be approved yet. ${missing}`)
  await trx
    .updateTable('protocolVersion')
    .set({ state: 'approved', approvedBy: actor.personId, approvedAt: now, version: found.version + 1 })
    .where('id', '=', found.id)
    .execute()
  return { version: found.version + 1, approvedAt: now }
}

/** Locking a version by starting a study on it is no writing; changing its plan or note is. */
async function hasWritten(trx: Trx, actor: Actor, versionId: string): Promise<boolean> {
  const entry = await trx
    .selectFrom('trail')
    .select('id')
    .where('tableName', '=', 'protocol_version')
    .where('rowId', '=', versionId)
    .where('actorId', '=', actor.personId)
    .where(
      sql<boolean>`(before -> 'plan' is distinct from after -> 'plan' or before -> 'note' is distinct from after -> 'note')`,
    )
    .limit(1)
    .executeTakeFirst()
  return entry !== undefined
}
