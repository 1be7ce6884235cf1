import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listPhotos } from '@/lib/photo/queries/list'
import { trendBand } from '@/lib/science/trend'
import { weeksBetween } from '@/lib/study/rules/calendar'
import { curvesFinding } from '@/lib/study/rules/curves'
import { findBeside, listBesideOffers } from './beside'
import { getStudyHead, listStudyBatches, listStudyStations } from './head'
import { listOpenFlags, listStudySeries } from './parts'
import { headOf } from './sheet'

/**
 * The curves of a study: at most eight statements; points and trends come with the series that were computed from
 * them. `beside` names a batch of another study, whose readings are drawn along.
 */
export async function getCurves(db: Db, actor: Actor, code: string, beside = '') {
  const study = await getStudyHead(db, actor, code)
  const stations = await listStudyStations(db, study.id)
  const batches = await listStudyBatches(db, study.id)
  const series = await listStudySeries(db, study.id)
  const flags = await listOpenFlags(db, study.id)
  const photos = await listPhotos(db, actor, code)
  const times = Array.from({ length: 25 }, (_, step) => (study.endWeeks * step) / 24)
  return {
    study: headOf(study),
    stations: stations.map((station) => ({
      ...station,
      timePoints: study.plan.stations[station.position]?.timePoints ?? [],
    })),
    batches,
    series: series.map((one) => ({ ...one, line: trendBand(one.finding, times) })),
    flags,
    photos,
    beside: beside === '' ? null : await findBeside(db, actor, beside),
    offers: await listBesideOffers(db, actor, study.id),
    todayWeeks: study.state === 'running' ? weeksBetween(study.startedOn, study.today) : null,
    finding: curvesFinding({
      plan: study.plan,
      study,
      stations,
      batches: batches.filter((batch) => !batch.isReference),
      series: series.filter((one) => !batches.some((batch) => batch.id === one.batchId && batch.isReference)),
    }),
  }
}
export type CurvesPage = Awaited<ReturnType<typeof getCurves>>
