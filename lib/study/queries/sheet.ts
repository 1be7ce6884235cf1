import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { stationName } from '@/lib/protocol/rules/plan'
import { separationDetectionLimit } from '@/lib/science/separation'
import { cellsOf, worstOf } from '@/lib/study/rules/cells'
import { weeksBetween } from '@/lib/study/rules/calendar'
import { studyFinding } from '@/lib/study/rules/finding'
import { getStudyHead, listStudyBatches, listStudyStations, type StudyHead } from './head'
import {
  listCurrentReadings,
  listOpenFlags,
  listStationMeans,
  listStudyPullJars,
  listStudySeries,
  type OpenFlag,
  type PullJarRow,
  type SeriesRow,
} from './parts'
import type { StudyBatchRow, StudyStationRow } from './head'

/** The sheet of a study: eight statements whatever the number of jars, readings and batches. */
export async function getSheet(db: Db, actor: Actor, code: string) {
  const study = await getStudyHead(db, actor, code)
  const stations = await listStudyStations(db, study.id)
  const batches = await listStudyBatches(db, study.id)
  const pullJars = withoutEnded(await listStudyPullJars(db, study.id), stations)
  const series = inPlanOrder(await listStudySeries(db, study.id), study)
  const flags = await listOpenFlags(db, study.id)
  const readings = await listCurrentReadings(db, study.id)
  const means = await listStationMeans(db, study.id)
  const { fillHeightMm } = study.plan
  const shown = { pullJars, readings, series, today: study.today, fillHeightMm, plan: study.plan }
  return {
    study: headOf(study),
    batches,
    finding: findingOf({ study, stations, batches, pullJars, series, flags }),
    detectionPercent: separationDetectionLimit(
      fillHeightMm,
      study.plan.attributes.find((one) => one.attribute === 'separation')?.rulerMm,
    ),
    todayWeeks: study.state === 'running' ? weeksBetween(study.startedOn, study.today) : null,
    flags,
    shelves: batches.map((batch) => ({
      batchId: batch.id,
      rows: stations.map((station) => {
        const own = series.filter((one) => one.batchId === batch.id && one.studyStationId === station.id)
        const nearest = own
          .filter((one) => one.used !== null)
          .toSorted((a, b) => (b.used ?? 0) - (a.used ?? 0))[0]
        const separation = own.find((one) => one.attribute === 'separation')
        return {
          station: { ...station, meanC: means.find((mean) => mean.id === station.id)?.meanC ?? null },
          standing: worstOf(own.map((one) => one.standing)),
          cells: cellsOf(batch.id, station.id, shown),
          frontWeeks: separation?.outSinceWeeks ?? null,
          leavesAt: leaving(separation),
          nearest: nearest ? { attribute: nearest.attribute, used: nearest.used ?? 0 } : null,
        }
      }),
    })),
  }
}
export type SheetPage = Awaited<ReturnType<typeof getSheet>>
export type SheetShelf = SheetPage['shelves'][number]['rows'][number]

/** Where a station ended early, its shelf ends: what was planned after that day is told by the amendment. */
function withoutEnded(pullJars: PullJarRow[], stations: StudyStationRow[]): PullJarRow[] {
  return pullJars.filter((jar) => {
    const endedOn = stations.find((station) => station.id === jar.studyStationId)?.endedOn
    return !endedOn || jar.state !== 'missed' || jar.dueOn <= endedOn
  })
}

/** Attributes stand in the order in which the protocol measures them. */
function inPlanOrder(series: SeriesRow[], { plan }: StudyHead): SeriesRow[] {
  const order = plan.attributes.map((one) => one.attribute as string)
  return series.toSorted((a, b) => order.indexOf(a.attribute) - order.indexOf(b.attribute))
}

function leaving(separation: SeriesRow | undefined) {
  if (separation?.standing !== 'leaning' || separation.leavesAtWeeks === null) return null
  const { leavesAtLow, leavesAtHigh } = separation.finding
  return { weeks: separation.leavesAtWeeks, low: leavesAtLow, high: leavesAtHigh }
}

/** What a page shows of its study; the plan stays on the server. */
export function headOf({ plan, ...study }: StudyHead) {
  return {
    ...study,
    fillHeightMm: plan.fillHeightMm,
    attributes: plan.attributes,
    stationNames: plan.stations.map(stationName),
  }
}
export type ShownStudy = ReturnType<typeof headOf>

/** The finding from what the page has read already. */
export function findingOf(page: {
  study: StudyHead
  stations: StudyStationRow[]
  batches: StudyBatchRow[]
  pullJars: Pick<PullJarRow, 'dueOn' | 'windowFrom' | 'windowTo' | 'state' | 'closedAt' | 'asks'>[]
  series: SeriesRow[]
  flags: OpenFlag[]
}) {
  const { study, stations, pullJars } = page
  // References stand beside the study: the finding is of its own batches.
  const batches = page.batches.filter((batch) => !batch.isReference)
  const isOwn = ({ batchId }: { batchId: string }) => batches.some((batch) => batch.id === batchId)
  const series = page.series.filter(isOwn)
  const flags = page.flags.filter(isOwn)
  const { today } = study
  const todays = pullJars.filter(
    (jar) =>
      (jar.dueOn === today && jar.state !== 'missed') ||
      (jar.dueOn < today && (jar.state === 'due' || jar.state === 'resting')),
  )
  const next = pullJars
    .filter((jar) => jar.dueOn > today)
    .map((jar) => jar.dueOn)
    .toSorted()[0]
  return studyFinding({
    startedOn: study.startedOn,
    endWeeks: study.endWeeks,
    state: study.state,
    stations: stations.map((station) => ({
      id: station.id,
      temperatureC: station.temperatureC,
      kind: station.kind,
      variant: station.variant,
      timePoints: study.plan.stations[station.position]?.timePoints ?? [],
    })),
    series,
    batchCodes: batches.map((batch) => batch.code),
    flags,
    flagsBeside: page.flags.length - flags.length,
    today: { due: todays.length, done: todays.filter((jar) => jar.state === 'done').length },
    nextPullOn: next ?? null,
  })
}
