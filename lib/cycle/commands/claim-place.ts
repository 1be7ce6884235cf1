import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudy } from '@/lib/series/commands'
import { findCyclePlace, type CyclePlace } from '../queries/board'

/** Of two who press or type at once the second waits here, and then sees what the first has done. */
export async function claimPlace(trx: Trx, studyStationId: string): Promise<CyclePlace> {
  const found = await findCyclePlace(trx, studyStationId)
  // What is told may doubt readings, as a jar that is saved may read it: study first, in either case.
  if (found) await lockStudy(trx, found.studyId)
  await trx
    .selectFrom('studyStation')
    .select('id')
    .where('id', '=', studyStationId)
    .forNoKeyUpdate()
    .executeTakeFirst()
  const place = await findCyclePlace(trx, studyStationId)
  if (!place) throw refuse.notFound('There is no such freeze-thaw station in a study.')
  return place
}
