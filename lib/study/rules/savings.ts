import { askedWeeks, pulledFor, stationName } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { boundWidening } from '@/lib/science/bound-width'
import { gramsOfJars } from '@/lib/science/jar-grams'
import { rulerPercent } from '@/lib/science/separation'
import type { StudyAdjustments } from '@/lib/study/schema'
import { inSentence } from './finding'
import { plannedJars, type TakenBatches } from './jars'
import { adjustedPlan, waysToFit } from './plan'
import { capital, counted, listed } from './words'

/** What fewer times at a station do to the bound of its trends. */
export type Widening = { times: number[]; kept: number[]; at: number; percent: number }

export type Saving = {
  key: string
  act: string
  /** What it adds to the study's adjustments. */
  adjustments: StudyAdjustments
  isTaken: boolean
  jars: number
  grams: number
  cost: string
  widening: Widening | null
}

type Way = Pick<Saving, 'key' | 'act' | 'adjustments' | 'cost'> & { widening?: Widening | null }

const mostShown = 8

/**
 * The largest ways to take less of the batches, each with what it costs; those taken already among them, so that each
 * can be put back. `shortG` is what the batch that is short has left; null where none is.
 */
export function savingsOf(
  plan: ProtocolPlan,
  adjustments: StudyAdjustments,
  batches: TakenBatches,
  shortG: number | null,
): Saving[] {
  const takes = (of: StudyAdjustments) => {
    const adjusted = adjustedPlan(plan, of)
    const jars = plannedJars(adjusted, batches.batchIds, batches.referenceIds).length
    return { jars, grams: gramsOfJars(jars, adjusted.fillG, adjusted.lossPercent) }
  }
  const now = takes(adjustments)
  const asPlanned = takes({})
  const savings = waysOf(plan, shortG).map((way) => {
    const isTaken = isIn(adjustments, way.adjustments)
    const other = takes(
      isTaken ? withoutSaving(adjustments, way.adjustments) : withSaving(adjustments, way.adjustments),
    )
    const [more, less] = isTaken ? [other, now] : [now, other]
    const alone = takes(way.adjustments)
    return {
      ...way,
      widening: way.widening ?? null,
      isTaken,
      jars: more.jars - less.jars,
      grams: more.grams - less.grams,
      rank: asPlanned.grams - alone.grams,
    }
  })
  const ranked = savings
    .filter((one) => one.rank > 0.05 && (one.isTaken || one.grams > 0.05))
    .toSorted((a, b) => b.rank - a.rank)
  // Rows keep their places while one presses them.
  return ranked
    .filter((one, index) => one.isTaken || index < mostShown || one.key.startsWith('fit'))
    .map(({ rank: _, ...saving }) => saving)
}

/** The study's adjustments with one more of the ways; a fill replaces another fill. */
export function withSaving(before: StudyAdjustments, way: StudyAdjustments): StudyAdjustments {
  const spares = [...sparesBeside(before, way), ...(way.spares ?? [])]
  return {
    ...before,
    ...way,
    ...lists((key) => joined(before[key], way[key])),
    spares: spares.length > 0 ? spares : undefined,
  }
}

export function withoutSaving(before: StudyAdjustments, way: StudyAdjustments): StudyAdjustments {
  const { fillG, leaveOutRetains, ...rest } = before
  const spares = sparesBeside(before, way)
  return {
    ...rest,
    spares: spares.length > 0 ? spares : undefined,
    ...(way.fillG === undefined && fillG !== undefined ? { fillG } : {}),
    ...(way.leaveOutRetains === undefined && leaveOutRetains !== undefined ? { leaveOutRetains } : {}),
    ...lists((key) => before[key]?.filter((one) => !way[key]?.includes(one))),
  }
}

/** Numbers of spares at stations of which the way says nothing. */
function sparesBeside({ spares = [] }: StudyAdjustments, way: StudyAdjustments) {
  return spares.filter((one) => !way.spares?.some((other) => other.position === one.position))
}

const listKeys = ['leaveOutWeeks', 'everySecondTime', 'oneJarAPull'] as const

function lists(of: (key: (typeof listKeys)[number]) => number[] | undefined): StudyAdjustments {
  return Object.fromEntries(
    listKeys.map((key) => {
      const list = of(key)
      return [key, list && list.length > 0 ? list : undefined]
    }),
  )
}

function joined(one: number[] = [], other: number[] = []): number[] {
  return [...new Set([...one, ...other])].toSorted((a, b) => a - b)
}

function isIn(adjustments: StudyAdjustments, way: StudyAdjustments): boolean {
  return (
    (way.fillG === undefined || way.fillG === adjustments.fillG) &&
    (way.leaveOutRetains === undefined || adjustments.leaveOutRetains === true) &&
    (way.spares ?? []).every((one) =>
      adjustments.spares?.some((other) => other.position === one.position && other.spares === one.spares),
    ) &&
    listKeys.every((key) => (way[key] ?? []).every((one) => adjustments[key]?.includes(one)))
  )
}

function waysOf(plan: ProtocolPlan, shortG: number | null): Way[] {
  const fit = shortG === null ? [] : waysToFit(plan, shortG).filter(({ kind }) => kind !== 'retains')
  const fitting = fit.map(({ kind, label, adjustments }) => ({
    key: `fit ${kind}`,
    act: label,
    adjustments,
    cost: kind === 'fill' ? fillCost(plan, adjustments) : weeksCost(plan, adjustments),
  }))
  return [
    ...fitting,
    // Of ways that save the same, what decides is touched last.
    ...[...plan.stations.entries()]
      .toSorted(([, a], [, b]) => Number(a.voice === 'decides') - Number(b.voice === 'decides'))
      .flatMap(([position, station]) => stationWays(plan, station, position)),
    ...(fit.some(({ kind }) => kind === 'fill') ? [] : [lessFill(plan)]),
    ...(plan.retains > 0
      ? [
          {
            key: 'retains',
            act: `Leave out the ${plan.retains === 1 ? 'retain jar' : `${plan.retains} retain jars`}`,
            adjustments: { leaveOutRetains: true },
            cost: 'No untouched jar is kept for a question that comes later.',
          },
        ]
      : []),
  ]
}

function stationWays(plan: ProtocolPlan, station: PlannedStation, position: number): Way[] {
  const name = stationName(station, position)
  const ways: Way[] = [fewerTimes(plan, station, position, name)].filter((way) => way !== null)
  if (station.measuringJarsPerPull > 1) {
    ways.push({
      key: `one ${position}`,
      act: `Open one measuring jar a pull at ${name}`,
      adjustments: { oneJarAPull: [position] },
      cost: 'A single jar that is off is not told from a drift until the next pull, and how far jars differ is not known.',
    })
  }
  if (station.spares > 0) {
    const gap = Math.max(...gaps([0, ...station.timePoints]))
    ways.push({
      key: `spares ${position}`,
      act: `No spare at ${name}`,
      adjustments: { spares: [{ position, spares: 0 }] },
      cost: `A reading that is doubted or beyond its band has no jar for its repeat: it stays unconfirmed until the next pull, up to ${counted(gap, 'week')} later.`,
    })
  }
  return ways
}

/** Every second of the middle pulls opens no jar; what that costs is computed from the times that are left. */
function fewerTimes(plan: ProtocolPlan, station: PlannedStation, position: number, name: string): Way | null {
  const adjustments = { everySecondTime: [position] }
  const left = adjustedPlan(plan, adjustments)
  const times = [0, ...askedWeeks(plan, station, 'measuring')]
  const kept = [0, ...askedWeeks(left, left.stations[position]!, 'measuring')]
  if (station.measuringJarsPerPull === 0 || kept.length === times.length) return null
  const measured = pulledFor(plan, 'measuring')
  const what =
    measured.length > 0 ? listed(measured.map(({ attribute }) => inSentence(attribute))) : 'measure'
  const later = Math.max(
    ...times.filter((time) => !kept.includes(time)).map((time) => kept.find((one) => one > time)! - time),
  )
  const isTrend =
    station.kind === 'temperature' && measured.some((one) => attributeOf(one.attribute, one).isGradual)
  const widening =
    isTrend && kept.length >= 3
      ? { times, kept, at: plan.endWeeks, percent: boundWidening(times, kept, plan.endWeeks) }
      : null
  const coldest = Math.min(
    ...plan.stations.map((one) => (one.kind === 'temperature' ? (one.temperatureC ?? Infinity) : Infinity)),
  )
  return {
    key: `second ${position}`,
    act: `${what.startsWith('pH') ? what : capital(what)} at every second time point at ${name}`,
    adjustments,
    widening,
    cost: [
      `${station.voice === 'decides' ? 'This station decides: a' : 'A'} drift there is seen up to ${counted(later, 'week')} later.`,
      kept.length < 5 && times.length >= 5
        ? `With ${counted(kept.length, 'time')} left, the initial among them, a slow one is never told ahead.`
        : '',
      station.kind === 'temperature' && station.temperatureC === coldest && plan.stations.length > 1
        ? 'The warmer stations are compared with this one on the same days, to tell the emulsion from the instrument; on the days left out they are not.'
        : '',
    ]
      .filter(Boolean)
      .join(' '),
  }
}

function lessFill(plan: ProtocolPlan): Way {
  const adjustments = { fillG: Number((plan.fillG * 0.8).toFixed(1)) }
  return {
    key: 'fill',
    act: `Fill ${adjustments.fillG.toFixed(1)} g instead of ${plan.fillG.toFixed(1)} g`,
    adjustments,
    cost: fillCost(plan, adjustments),
  }
}

function fillCost(plan: ProtocolPlan, adjustments: StudyAdjustments): string {
  const { fillHeightMm } = adjustedPlan(plan, adjustments)
  const percent = (mm: number) => rulerPercent(mm).toFixed(1)
  return `The jar is filled ${fillHeightMm} mm high instead of ${plan.fillHeightMm}: a millimetre of the ruler is ${percent(fillHeightMm)} % of that instead of ${percent(plan.fillHeightMm)} %, so a layer is seen and told apart later. Weight loss weighs more in a smaller fill.`
}

function weeksCost(plan: ProtocolPlan, { leaveOutWeeks = [] }: StudyAdjustments): string {
  const later = Math.max(
    ...plan.stations
      .filter(({ kind }) => kind === 'temperature')
      .flatMap(({ timePoints }) =>
        leaveOutWeeks
          .filter((week) => timePoints.includes(week))
          .map((week) => timePoints.find((one) => one > week && !leaveOutWeeks.includes(one))! - week),
      ),
  )
  return `Nothing is read or looked at then at any temperature: what begins before is seen up to ${counted(later, 'week')} later.`
}

function gaps(times: number[]): number[] {
  return times.slice(1).map((time, index) => time - times[index]!)
}
