import { matrixed } from '@/lib/protocol/rules/matrixing'
import { askedWeeks, jarsOfPlan, pulledFor, weeksOfPlan } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { fillFromGrams } from '@/lib/science/jar-grams'
import type { StudyAdjustments } from '@/lib/study/schema'

export type FitOption = {
  kind: 'fill' | 'weeks' | 'retains'
  label: string
  adjustments: StudyAdjustments
  jars: number
  grams: number
  /** Grams left over; negative where some are still missing. */
  leftG: number
}

/** The protocol's plan as this study follows it. */
export function adjustedPlan(plan: ProtocolPlan, adjustments: StudyAdjustments): ProtocolPlan {
  const without = new Set(adjustments.leaveOutWeeks ?? [])
  const fillG = adjustments.fillG ?? plan.fillG
  const adjusted = {
    ...plan,
    fillG,
    fillHeightMm: fillG === plan.fillG ? plan.fillHeightMm : filledHeight(plan, fillG),
    retains: adjustments.leaveOutRetains ? 0 : plan.retains,
    stations: startedPositions(plan, adjustments).map((position) => {
      const station = plan.stations[position]!
      const spares = adjustments.spares?.find((one) => one.position === position)?.spares ?? station.spares
      // Cycles are counted, so none of them can be left out.
      const timePoints =
        station.kind === 'temperature'
          ? station.timePoints.filter((week) => !without.has(week))
          : station.timePoints
      return { ...station, spares, timePoints }
    }),
  }
  // With other middle time points, others of them are left out.
  const timed = plan.matrixing && without.size > 0 ? matrixed(adjusted, plan.matrixing.attributes) : adjusted
  const started = startedPositions(plan, adjustments)
  return {
    ...timed,
    stations: timed.stations.map((station, index) => {
      const isIn = (positions: number[] | undefined) => positions?.includes(started[index]!) ?? false
      const fewer = isIn(adjustments.everySecondTime) ? everySecond(timed, station) : station
      return {
        ...fewer,
        measuringJarsPerPull: isIn(adjustments.oneJarAPull)
          ? Math.min(1, fewer.measuringJarsPerPull)
          : fewer.measuringJarsPerPull,
      }
    }),
  }
}

/** Of a straight-walled jar: a tenth of a millimetre is as close as it is read. */
function filledHeight({ fillHeightMm, fillG: usualG }: ProtocolPlan, fillG: number): number {
  return Number(((fillHeightMm * fillG) / usualG).toFixed(1))
}

/**
 * A station at which every second of the middle pulls opens no jar. The sealed jars are looked at all the same; where
 * none stands, the pull is left out.
 */
function everySecond(plan: ProtocolPlan, station: PlannedStation): PlannedStation {
  const opened = askedWeeks(plan, station, 'measuring')
  const weeks = opened.slice(1, -1).filter((_, index) => index % 2 === 0)
  const isLooked = station.watchJars > 0 && pulledFor(plan, 'watch').length > 0
  const measured = pulledFor(plan, 'measuring')
  if (!isLooked) {
    // Cycles and legs are counted, so none of them can be left out.
    if (station.kind !== 'temperature') return station
    return { ...station, timePoints: station.timePoints.filter((week) => !weeks.includes(week)) }
  }
  const known = station.leftOut ?? []
  const cells = weeks
    .flatMap((week) => measured.map(({ attribute }) => ({ attribute, week })))
    .filter((cell) => !known.some((one) => one.week === cell.week && one.attribute === cell.attribute))
  return { ...station, leftOut: [...known, ...cells] }
}

/** Positions in the protocol's plan of the stations that start; the study's own plan holds these alone, in this order. */
export function startedPositions(plan: ProtocolPlan, { leaveOutStations = [] }: StudyAdjustments): number[] {
  return plan.stations.map((_, position) => position).filter((one) => !leaveOutStations.includes(one))
}

/** Stations are named by their position in the protocol; the study's own plan holds those that start. */
export function startedChoices(
  plan: ProtocolPlan,
  adjustments: StudyAdjustments,
  choices: { position: number; stationId: string }[],
): { position: number; stationId: string }[] {
  const started = startedPositions(plan, adjustments)
  return choices.flatMap(({ position, stationId }) => {
    const at = started.indexOf(position)
    return at === -1 ? [] : [{ position: at, stationId }]
  })
}

/** What would make a study fit a batch: less in each jar, fewer early weeks, no retains. */
export function waysToFit(plan: ProtocolPlan, batchG: number): FitOption[] {
  const options = [lessFill(plan, batchG), fewerWeeks(plan, batchG), withoutRetains(plan)]
  return options
    .filter((option) => option !== null)
    .map(({ kind, label, adjustments }) => {
      const { jars, grams } = jarsOfPlan(adjustedPlan(plan, adjustments), batchG)
      return { kind, label, adjustments, jars, grams, leftG: batchG - grams }
    })
}

type Way = Pick<FitOption, 'kind' | 'label' | 'adjustments'>

/** Half the fill at least: below that the jar is another pack. */
function lessFill(plan: ProtocolPlan, batchG: number): Way | null {
  const { jars } = jarsOfPlan(plan, batchG)
  const fillG = fillFromGrams(batchG, jars, plan.lossPercent)
  if (fillG < plan.fillG / 2 || fillG >= plan.fillG) return null
  const label = `Fill ${fillG.toFixed(1)} g instead of ${plan.fillG.toFixed(1)} g`
  return { kind: 'fill', label, adjustments: { fillG } }
}

/** Odd weeks first, then even ones, from the start on; the last pull of each station stays. */
function fewerWeeks(plan: ProtocolPlan, batchG: number): Way | null {
  const last = new Set(plan.stations.map((station) => station.timePoints.at(-1)))
  const early = weeksOfPlan(plan).filter(
    (week) =>
      !last.has(week) && plan.stations.some((s) => s.kind === 'temperature' && s.timePoints.includes(week)),
  )
  const inOrder = [...early.filter((week) => week % 2 === 1), ...early.filter((week) => week % 2 !== 1)]
  const leaveOutWeeks: number[] = []
  for (const week of inOrder.slice(0, Math.max(1, inOrder.length - 2))) {
    leaveOutWeeks.push(week)
    if (jarsOfPlan(adjustedPlan(plan, { leaveOutWeeks }), batchG).fits) break
  }
  if (leaveOutWeeks.length === 0) return null
  leaveOutWeeks.sort((a, b) => a - b)
  return {
    kind: 'weeks',
    label: `Leave out ${leaveOutWeeks.length === 1 ? 'week' : 'weeks'} ${listed(leaveOutWeeks.map(String))}`,
    adjustments: { leaveOutWeeks },
  }
}

function withoutRetains(plan: ProtocolPlan): Way | null {
  if (plan.retains === 0) return null
  const label = `Leave out the ${plan.retains === 1 ? 'retain jar' : `${plan.retains} retain jars`}`
  return { kind: 'retains', label, adjustments: { leaveOutRetains: true } }
}

function listed(items: string[]): string {
  return items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`
}
