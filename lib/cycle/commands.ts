import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { CycleStep } from './schema'

/** One half of a freeze-thaw cycle, as it was. Sending it twice keeps one. */
export async function logCycleStep(trx: Trx, actor: Actor, input: CycleStep, now: string) {
  const place = await trx
    .selectFrom('studyStation as ss')
    .innerJoin('study', 'study.id', 'ss.studyId')
    .innerJoin('station', 'station.id', 'ss.stationId')
    .select(['ss.isFreezeThaw', 'study.state', 'study.code', 'station.name'])
    .where('ss.id', '=', input.studyStationId)
    .forUpdate('ss')
    .executeTakeFirst()
  if (!place) throw refuse.notFound('There is no such station in a study.')
  if (!place.isFreezeThaw)
    throw refuse.conflict(`${place.name} is no freeze-thaw station, so it has no cycles.`)
  if (place.state === 'closed')
    throw refuse.conflict(`Study ${place.code} is closed, so it takes no more cycles.`)
  if (Date.parse(input.endedAt) > Date.parse(now)) {
    throw refuse.invalid('A half is logged after it ended, and this end lies ahead. Correct the time.', {
      endedAt: 'This time lies ahead.',
    })
  }
  const logged = await trx
    .selectFrom('cycleStep')
    .select(['id', 'half', 'endedAt'])
    .where('studyStationId', '=', input.studyStationId)
    .where('cycle', '=', input.cycle)
    .execute()
  if (logged.some((step) => step.id === input.id)) return { id: input.id }
  if (logged.some((step) => step.half === input.half)) {
    throw refuse.conflict(
      `The ${input.half} half of cycle ${input.cycle} is logged already. Reload to see it.`,
    )
  }
  await trx
    .insertInto('cycleStep')
    .values({ ...input, recordedBy: actor.personId })
    .execute()
  return { id: input.id }
}
