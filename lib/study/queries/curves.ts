import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listPhotos } from '@/lib/photo/queries'
import { trendBand } from '@/lib/science/trend'
import { weeksBetween } from '@/lib/study/rules/calendar'
import { curvesFinding } from '@/lib/study/rules/curves'
import { getStudyHead, listStudyBatches, listStudyStations } from './head'
import { listOpenFlags, listStudySeries } from './parts'
import { headOf } from './sheet'

/** The curves of a study: six statements; points and trends come with the series that were computed from them. */
export async function getCurves(db: Db, actor: Actor, code: string) {
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
    todayWeeks: study.state === 'running' ? weeksBetween(study.startedOn, study.today) : null,
    finding: curvesFinding({ study, stations, batches, series }),
  }
}
export type CurvesPage = Awaited<ReturnType<typeof getCurves>>
