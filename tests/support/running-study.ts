import type { Actor } from '@/lib/auth/actor'
import { db } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import type { ProtocolPlan } from '@/lib/protocol/schema'

/** Rows that a study needs before it can start, written as the application's role, without the forms. */

export async function makeBatch(
  actor: Actor,
  { code, yieldG = 3000, state = 'released' }: { code: string; yieldG?: number; state?: string },
): Promise<string> {
  const [formulaId, versionId, batchId] = [newId(), newId(), newId()]
  await transact(db, actor, {}, async (trx) => {
    await trx
      .insertInto('formula')
      .values({
        id: formulaId,
        code: `F-${code}`,
        name: 'silicone-free cream',
        emulsionType: 'water-in-oil',
        createdBy: actor.personId,
      })
      .execute()
    await trx
      .insertInto('formulaVersion')
      .values({ id: versionId, formulaId, number: 1, state: 'locked', createdBy: actor.personId })
      .execute()
    await trx
      .insertInto('formulaLine')
      .values([
        {
          id: newId(),
          formulaVersionId: versionId,
          position: 0,
          phase: 'A',
          inciName: 'Squalane',
          percentThousandths: 13_000,
          density: 0.81,
          isInternal: false,
        },
        {
          id: newId(),
          formulaVersionId: versionId,
          position: 1,
          phase: 'B',
          inciName: 'Aqua',
          percentThousandths: 87_000,
          density: 1,
          isInternal: true,
        },
      ])
      .execute()
    await trx
      .insertInto('batch')
      .values({
        id: batchId,
        code,
        formulaVersionId: versionId,
        sizeG: yieldG,
        yieldG,
        state,
        madeAt: new Date(Date.now() - 86_400_000).toISOString(),
        createdBy: actor.personId,
      })
      .execute()
  })
  return batchId
}

export async function makeProtocol(actor: Actor, plan: ProtocolPlan = readyMadePlan('screen', 'cream')) {
  const [protocolId, versionId] = [newId(), newId()]
  await transact(db, actor, {}, async (trx) => {
    await trx
      .insertInto('protocol')
      .values({
        id: protocolId,
        code: `P-${protocolId.slice(-6)}`,
        name: 'A screen',
        createdBy: actor.personId,
      })
      .execute()
    await trx
      .insertInto('protocolVersion')
      .values({
        id: versionId,
        protocolId,
        number: 1,
        plan: JSON.stringify(plan),
        createdBy: actor.personId,
      })
      .execute()
  })
  return versionId
}

/** A station for each of 5, 25, 40, 45 °C and one that cycles. */
export async function makeStations(actor: Actor, places = 200): Promise<Map<string, string>> {
  const ids = new Map<string, string>()
  await transact(db, actor, {}, async (trx) => {
    for (const [index, temperatureC] of [5, 25, 40, 45, null].entries()) {
      const id = newId()
      ids.set(temperatureC === null ? 'freeze-thaw' : String(temperatureC), id)
      await trx
        .insertInto('station')
        .values({
          id,
          name: temperatureC === null ? 'Cycling cabinet' : `Station ${temperatureC}`,
          kind: temperatureC === null ? 'freeze-thaw' : 'temperature',
          temperatureC,
          lowC: temperatureC === null ? null : temperatureC - 2,
          highC: temperatureC === null ? null : temperatureC + 2,
          cycleLowC: temperatureC === null ? -10 : null,
          cycleHighC: temperatureC === null ? 25 : null,
          walkOrder: index + 1,
          shelves: 1,
          placesPerShelf: places,
        })
        .execute()
    }
  })
  return ids
}

/** Initial readings as a formulator types them. */
export function initialOf(batchId: string) {
  return [
    { batchId, attribute: 'ph' as const, typed: ['5,60', '5.62'] },
    { batchId, attribute: 'viscosity' as const, typed: ['62'], isTorque: true },
  ]
}
