import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { recomputeSeries } from '@/lib/series/commands'
import type { CyclePlace } from '../queries/board'
import { cycleDoubts, type LoggedHalf } from '../rules/shortfall'

export type KeptHalf = LoggedHalf & { id: string; endedAt: string }

/**
 * A half that fell short doubts what was read after it, also where it came to be known later than that. The study is
 * locked: a jar that is saved at this moment is seen here, or sees the half itself.
 */
export async function reachBackFromHalf(trx: Trx, actor: Actor, place: CyclePlace, half: KeptHalf) {
  const [doubt] = cycleDoubts(place, [half], place.asked ?? undefined)
  if (!doubt) return 0
  const { rows: readings } = await sql<{ id: string }>`
    select r.id from reading r
    where r.study_station_id = ${place.id} and r.measured_at > ${half.endedAt} and not r.is_void
      and not exists (select from reading newer where newer.supersedes_id = r.id)
      and not exists (select from jsonb_array_elements(r.doubts) d where d -> 'cycleStepIds' ? ${half.id})
  `.execute(trx)
  if (readings.length === 0) return 0
  await trx
    .insertInto('readingDoubt')
    .values(
      readings.map((reading) => ({
        ...{ id: newId(), readingId: reading.id, cycleStepId: half.id, recordedBy: actor.personId },
        ...{ reason: doubt.reason, sentence: doubt.sentence },
      })),
    )
    .execute()
  await recomputeSeries(trx, actor, place.studyId)
  return readings.length
}
