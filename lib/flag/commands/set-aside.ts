import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { recomputeSeries } from '@/lib/series/commands'
import type { FlagSettling } from '../schema'
import { claimFlag } from './claim'

const laboratoryCauses = ['measurement', 'instrument', 'station']

/**
 * Settles what stands behind a flag, with a cause: a doubt is set aside and its reading counts, or QA sets the
 * reading aside and it never does. Either way it stays on record, and the series are computed anew.
 */
export async function setAside(trx: Trx, actor: Actor, number: number, input: FlagSettling) {
  const flag = await claimFlag(trx, number, input.version)
  if (input.settles === 'doubt' && flag.level !== 'doubt') {
    throw refuse.conflict(
      `Flag ${number} is no doubt about a reading, so there is none to set aside. Answer it instead.`,
    )
  }
  if (input.settles === 'reading') refuseReading(actor, number, flag, input)
  const { version, state } = await trx
    .updateTable('flag')
    .set({
      state: 'closed',
      settles: input.settles,
      cause: input.cause,
      action:
        input.settles === 'doubt'
          ? 'The doubt is set aside; the reading counts.'
          : 'The reading is set aside.',
      why: input.why,
      answeredBy: actor.personId,
      answeredAt: flag.now,
      closedBy: actor.personId,
      closedAt: flag.now,
      version: flag.version + 1,
    })
    .where('id', '=', flag.id)
    .returning(['version', 'state'])
    .executeTakeFirstOrThrow()
  const recomputed = await recomputeSeries(trx, actor, flag.studyId, { only: [flag.attribute] })
  return { number, version, state, ...recomputed }
}

function refuseReading(
  actor: Actor,
  number: number,
  flag: { readingId: string | null; rule: string; onDay: string | null },
  input: FlagSettling,
): void {
  if (!actor.roles.includes('qa')) {
    throw refuse.forbidden('Only QA sets a reading aside, naming what went wrong in the laboratory.')
  }
  if (!flag.readingId && !flag.onDay) throw refuse.conflict(`Flag ${number} rests on no single reading.`)
  if (!laboratoryCauses.includes(input.cause)) {
    throw refuse.invalid(
      'A reading is set aside only for a laboratory cause: measurement, instrument or station.',
      {
        cause: 'Choose measurement, instrument or station.',
      },
    )
  }
}
