import { attributeOf } from '@/lib/reading/schema/attributes'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { minuteText } from '@/lib/report/rules'
import type { FigureFacts } from '@/lib/science/methods/method'
import { driftCalculation } from '@/lib/shelf-case/rules/drift-calculation'
import { getStudyHead } from '@/lib/study/queries/head'
import type { SeriesAddress } from '@/lib/study/schema'
import { assessStudy } from '../rules/assess'
import { seriesFacts } from '../rules/facts'
import { loadFrame } from './frame'

/** What one series is computed from: assessed as at each save, with the exact input of topic `drift`. */
export async function getSeriesFacts(
  db: Db,
  actor: Actor,
  code: string,
  { batchId, studyStationId, attribute }: SeriesAddress,
): Promise<FigureFacts> {
  const study = await getStudyHead(db, actor, code)
  const frame = await loadFrame(db, study.id)
  const kept = await db
    .selectFrom('series')
    .select('computedAt')
    .where('studyId', '=', study.id)
    .where('batchId', '=', batchId)
    .where('studyStationId', '=', studyStationId)
    .where('attribute', '=', attribute)
    .executeTakeFirst()
  const found = assessStudy(frame, new Set([attribute])).assessed.find(
    ({ unit }) => unit.batch.id === batchId && unit.station.id === studyStationId,
  )
  if (!found || !kept) throw refuse.notFound('This study has no such series.')
  const { station, batch } = found.unit
  return seriesFacts({
    attribute: attributeOf(attribute, frame.study.plan),
    station: station.name,
    batch: batch.code,
    input: found.input,
    finding: found.finding,
    calculation: driftCalculation(found.input),
    when: `Series computed ${minuteText(kept.computedAt, frame.study.zone)}.`,
  })
}
