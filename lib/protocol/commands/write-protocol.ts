import type { z } from 'zod'
import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { planFaults } from '@/lib/protocol/rules/faults'
import type { newProtocol, newProtocolVersion, ProtocolPlan, writtenPlan } from '@/lib/protocol/schema'
import { expectOne } from '@/lib/trail/queries'

export async function createProtocol(trx: Trx, actor: Actor, input: z.output<typeof newProtocol>) {
  const same = await trx
    .selectFrom('protocol')
    .select(['id', 'code'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (same) return { ...same, versionId: input.versionId }
  refuseFaults(input.plan)
  const code = await nextCode(trx)
  await trx
    .insertInto('protocol')
    .values({ id: input.id, code, name: input.name, createdBy: actor.personId })
    .execute()
  await trx
    .insertInto('protocolVersion')
    .values({
      id: input.versionId,
      protocolId: input.id,
      number: 1,
      plan: JSON.stringify(input.plan),
      note: input.note,
      createdBy: actor.personId,
    })
    .execute()
  return { id: input.id, code, versionId: input.versionId }
}

/** A locked version never changes; the next one begins as its copy. */
export async function beginProtocolVersion(
  trx: Trx,
  actor: Actor,
  code: string,
  input: z.output<typeof newProtocolVersion>,
) {
  const newest = await newestVersion(trx, code)
  if (newest.id === input.id) return { id: newest.id, number: newest.number }
  if (newest.state === 'draft') {
    throw refuse.conflict(
      `Version ${newest.number} of ${code} is still a draft. Change that one; a new version begins from a locked one.`,
    )
  }
  await trx
    .insertInto('protocolVersion')
    .values({
      id: input.id,
      protocolId: newest.protocolId,
      number: newest.number + 1,
      plan: JSON.stringify(newest.plan),
      createdBy: actor.personId,
    })
    .execute()
  return { id: input.id, number: newest.number + 1 }
}

export async function writePlan(
  trx: Trx,
  _actor: Actor,
  address: { code: string; number: number },
  input: z.output<typeof writtenPlan>,
) {
  const draft = await trx
    .selectFrom('protocolVersion')
    .innerJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .select(['protocolVersion.id', 'protocolVersion.state', 'protocolVersion.version'])
    .select(['protocolVersion.plan', 'protocol.name', 'protocol.id as protocolId'])
    .where('protocol.code', '=', address.code)
    .where('protocolVersion.number', '=', address.number)
    .forUpdate()
    .executeTakeFirst()
  if (!draft) throw refuse.notFound()
  const what = `version ${address.number} of ${address.code}`
  if (draft.state !== 'draft') {
    const why = draft.state === 'approved' ? `QA approved ${what}` : `A study follows ${what}`
    throw refuse.conflict(`${why}, so it is locked. Begin a new version to change the plan.`)
  }
  if (draft.version !== input.version) {
    await expectOne(trx, undefined, { table: 'protocol_version', id: draft.id, thing: what })
  }
  refuseFaults(input.plan)
  await trx
    .updateTable('protocolVersion')
    .set({ plan: JSON.stringify(input.plan), note: input.note, version: input.version + 1 })
    .where('id', '=', draft.id)
    .execute()
  if (draft.name !== input.name) {
    await trx
      .updateTable('protocol')
      .set((eb) => ({ name: input.name, version: eb('version', '+', 1) }))
      .where('id', '=', draft.protocolId)
      .execute()
  }
  return { version: input.version + 1 }
}

/** What contradicts itself is not kept; what is only unfinished is. */
function refuseFaults(plan: ProtocolPlan): void {
  const faults = planFaults(plan).filter((fault) => fault.keepsFrom === 'saving')
  const [first] = faults
  if (!first) return
  throw refuse.invalid(
    first.sentence,
    Object.fromEntries(faults.map(({ path, sentence }) => [path, sentence])),
  )
}

async function newestVersion(trx: Trx, code: string) {
  const newest = await trx
    .selectFrom('protocolVersion')
    .innerJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .select(['protocolVersion.id', 'protocolVersion.number', 'protocolVersion.state', 'protocolVersion.plan'])
    .select('protocol.id as protocolId')
    .where('protocol.code', '=', code)
    .orderBy('protocolVersion.number', 'desc')
    .limit(1)
    .forUpdate()
    .executeTakeFirst()
  if (!newest) throw refuse.notFound()
  return newest
}

/** The lock keeps two protocols made at the same moment from taking the same number. */
async function nextCode(trx: Trx): Promise<string> {
  const { rows } = await sql<{ last: number | null }>`
    select (select max(substring(code from '^P-(\\d+)$')::integer) from protocol) as last
      from (select pg_advisory_xact_lock(hashtext('protocol code'))) as held
  `.execute(trx)
  return `P-${String((rows[0]?.last ?? 0) + 1).padStart(2, '0')}`
}
