import { systemActor, type Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { enqueue } from '@/lib/jobs/enqueue'
import type { Frame } from '@/lib/series/queries/frame'
import { reconcileFlags } from '../rules/reconcile'
import type { WantedFlag } from '../rules/wanted'

/** Time for a slip to be corrected before anyone is told of it. */
const mailAfterSeconds = 15 * 60

export type RaisedFlag = {
  id: string
  number: number
  rule: string
  level: string
  attribute: string
  studyStationId: string | null
  sentence: string
}

/** Raises what the rules find anew and closes what they no longer find; one mail tells the followers. */
export async function keepFlags(
  trx: Trx,
  actor: Actor,
  frame: Frame,
  wanted: readonly WantedFlag[],
  only: ReadonlySet<string> | null,
  now: string,
): Promise<{ raised: RaisedFlag[]; cleared: number[] }> {
  const system = systemActor().personId
  const { raise, clear } = reconcileFlags(frame.flags, wanted, only, system)
  if (clear.length > 0) {
    await trx
      .updateTable('flag')
      .set((eb) => ({
        state: 'closed',
        closedBy: system,
        closedAt: now,
        closingNote: eb
          .case()
          .when('level', '=', 'doubt')
          .then('A repeat, a correction or a decision settled it.')
          .else('The readings that count no longer say so.')
          .end(),
        version: eb('version', '+', 1),
      }))
      .where(
        'id',
        'in',
        clear.map((flag) => flag.id),
      )
      .execute()
  }
  if (raise.length === 0) return { raised: [], cleared: clear.map((flag) => flag.number) }
  const raised = await trx
    .insertInto('flag')
    .values(
      raise.map((flag) => ({
        ...flag,
        id: newId(),
        studyId: frame.study.id,
        evidence: JSON.stringify(flag.evidence),
        raisedBy: actor.personId,
      })),
    )
    .returning(['id', 'number', 'rule', 'level', 'attribute', 'studyStationId', 'sentence'])
    .execute()
  await enqueue(
    trx,
    'flag.mail',
    { studyId: frame.study.id, since: now },
    { startAfter: mailAfterSeconds, singletonKey: frame.study.id },
  )
  return { raised, cleared: clear.map((flag) => flag.number) }
}
