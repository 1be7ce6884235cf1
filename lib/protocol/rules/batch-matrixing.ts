import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { listed } from '@/lib/study/rules/words'
import { pulledFor, stationName } from './plan'

/** Where a batch stands among those that take turns; null for one that is measured every time. */
export type Turn = { place: number; of: number } | null

const rounds = { half: 2, 'two thirds': 3 } as const

/**
 * The plan as one batch of several follows it. At each middle time point of a temperature station a part of the
 * batches is measured, by turns, so that each comes to the same share; the first, the last and, in a study beyond a
 * year, month 12 take all of them [std: ICH Q1D]. Watch jars are looked at every time: a look costs no jar.
 */
export function planOfBatch(plan: ProtocolPlan, turn: Turn): ProtocolPlan {
  if (!plan.batchMatrixing || turn === null || turn.of < 2) return plan
  const measured = pulledFor(plan, 'measuring')
  const stations = plan.stations.map((station, index) => {
    const weeks = restingWeeks(plan, index, turn.place)
    if (weeks.length === 0) return station
    const cells = weeks.flatMap((week) => measured.map(({ attribute }) => ({ attribute, week })))
    return { ...station, leftOut: [...(station.leftOut ?? []), ...cells] }
  })
  return { ...plan, stations }
}

/** Weeks at which the batch at this place is not measured at a station. */
function restingWeeks(plan: ProtocolPlan, index: number, place: number): number[] {
  if (!plan.batchMatrixing) return []
  // The same batches rest everywhere on one day, because a drift is told from the coldest station on the same days.
  const all = [...new Set(plan.stations.flatMap((station) => middleWeeks(plan, station)))].toSorted(
    (a, b) => a - b,
  )
  const round = rounds[plan.batchMatrixing]
  return middleWeeks(plan, plan.stations[index]!).filter((week) => (all.indexOf(week) + place) % round === 0)
}

/** At least three times must be left besides the initial, or there is no line to thin. */
function middleWeeks({ endWeeks }: ProtocolPlan, { kind, timePoints }: PlannedStation): number[] {
  if (kind !== 'temperature' || timePoints.length < 4) return []
  return timePoints.slice(1, -1).filter((week) => !(endWeeks > 52 && week === 52))
}

/** What can no longer be concluded where batches take turns. */
export function batchMatrixingPrice(plan: ProtocolPlan): string[] {
  if (!plan.batchMatrixing) return []
  const few = plan.stations.flatMap((station, index) => {
    const most = Math.max(...[0, 1, 2].map((place) => restingWeeks(plan, index, place).length))
    return most > 0 && station.timePoints.length - most + 1 < 5 ? [stationName(station, index)] : []
  })
  return [
    `At a middle time point ${plan.batchMatrixing} of the batches are measured, by turns: there batches cannot be compared with each other, and what a resting batch did is known only from its next time.`,
    'Whether batches may be pooled is tested on fewer points, so differences between them are less likely to be found; where they are found, each batch stands on its own short line and the shelf life comes out shorter.',
    'It holds for batches of one formula in one pack. A batch that drifts on its own is seen one turn later.',
    ...(few.length > 0
      ? [
          `At ${listed(few)} a batch is then read fewer than five times, the initial among them: its slow drift is never told ahead.`,
        ]
      : []),
  ]
}
