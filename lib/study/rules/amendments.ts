import { overlap } from '@/lib/protocol/rules/faults'
import { stationName } from '@/lib/protocol/rules/plan'
import { bandText, toleranceText } from '@/lib/protocol/rules/words'
import type { PlannedAttribute, PlannedStation, ProtocolPlan, Tolerance } from '@/lib/protocol/schema'
import { refuse } from '@/lib/http/errors'
import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import { isBeyondBand, toleranceBand } from '@/lib/science/band'
import { ScienceError } from '@/lib/science/guard'
import { nominalDay, spokenDay } from './calendar'
import { counted, shownWithUnit } from './words'

export type AmendedStation = { position: number; endedOn: string | null }
export type BatchJars = { batchId: string; code: string; watch: string[]; spares: string[] }

/** A new time point of a running study is refused where it could not be carried out. */
export function refuseNewTime(
  plan: ProtocolPlan,
  { position, endedOn }: AmendedStation,
  week: number,
  study: { startedOn: string; today: string },
): void {
  const station = plan.stations[position]!
  const name = stationName(station, position)
  const dueOn = nominalDay(study.startedOn, week)
  const fault = (sentence: string) => refuse.invalid(sentence, { week: sentence })
  if (endedOn)
    throw refuse.conflict(`${name} ended on ${spokenDay(endedOn)}. Choose a station that still runs.`)
  if (station.timePoints.includes(week)) throw fault(`Week ${week} is already a time point at ${name}.`)
  if (week > plan.endWeeks)
    throw fault(`The study ends in week ${plan.endWeeks}, so week ${week} cannot be added.`)
  if (dueOn < study.today) {
    throw fault(`Week ${week} was due on ${spokenDay(dueOn)}. A time point is added ahead, never behind.`)
  }
  const last = station.timePoints.at(-1) ?? 0
  if (station.kind !== 'temperature' && week < last) {
    throw fault(
      `${station.kind === 'freeze-thaw' ? 'Cycles' : 'Legs'} are counted, so one more comes after the last, in week ${last}.`,
    )
  }
  const near = [before(station, week), week, after(station, week)].filter((one) => one !== undefined)
  const overlapping = overlap({ timePoints: near, windowDays: station.windowDays }, name)
  if (overlapping) throw fault(overlapping)
}

function before({ timePoints }: PlannedStation, week: number): number | undefined {
  return timePoints.findLast((one) => one < week)
}

function after({ timePoints }: PlannedStation, week: number): number | undefined {
  return timePoints.find((one) => one > week)
}

/** The plan with one more time point; what is read there is what is read at the others. */
export function withTime(plan: ProtocolPlan, position: number, week: number): ProtocolPlan {
  return withStation(plan, position, (station) => ({
    ...station,
    timePoints: [...station.timePoints, week].toSorted((a, b) => a - b),
  }))
}

/** The plan of a station that ends today: what was due is kept, what lay ahead is not. */
export function withoutFuture(
  plan: ProtocolPlan,
  position: number,
  study: { startedOn: string; today: string },
): ProtocolPlan {
  return withStation(plan, position, (station) => ({
    ...station,
    timePoints: station.timePoints.filter((week) => nominalDay(study.startedOn, week) <= study.today),
  }))
}

function withStation(
  plan: ProtocolPlan,
  position: number,
  change: (station: PlannedStation) => PlannedStation,
): ProtocolPlan {
  return { ...plan, stations: plan.stations.map((one, at) => (at === position ? change(one) : one)) }
}

/** Jars of one new pull: every watch jar, and as many spares of each batch as a measurement takes. */
export function jarsOfNewTime(
  station: PlannedStation,
  name: string,
  batches: BatchJars[],
  isMeasured: boolean,
): { jarId: string; asks: 'watch' | 'measuring' }[] {
  const needed = isMeasured ? station.measuringJarsPerPull : 0
  const short = batches.find((batch) => batch.spares.length < needed)
  if (short) {
    throw refuse.conflict(
      `${short.code} has ${counted(short.spares.length, 'spare jar')} left at ${name}, and a measurement takes ${counted(needed, 'jar')} of each batch. Add the time point with the watch jars alone.`,
      { kind: 'spares', batch: short.code, left: short.spares.length, needed },
    )
  }
  const jars = batches.flatMap((batch) => [
    ...batch.watch.map((jarId) => ({ jarId, asks: 'watch' as const })),
    ...batch.spares.slice(0, needed).map((jarId) => ({ jarId, asks: 'measuring' as const })),
  ])
  if (jars.length === 0) throw refuse.conflict(`No jar is left at ${name} that could be pulled.`)
  return jars
}

type Initial = { batch: string; value: number | null }

/** The plan with another tolerance; the initial of every batch must lie inside, as at the start. */
export function withTolerance(
  plan: ProtocolPlan,
  attribute: PlannedAttribute['attribute'],
  tolerance: Tolerance,
  initials: Initial[],
): { plan: ProtocolPlan; sentence: string } {
  const label = attributeName(attribute)
  const planned = plan.attributes.find((one) => one.attribute === attribute)
  if (!planned) throw refuse.conflict(`${label} is not measured in this study, so it has no tolerance.`)
  const next = { ...planned, tolerance }
  const [was, is] = [toleranceText(planned), toleranceText(next)]
  if (isSame(planned.tolerance, tolerance)) {
    throw refuse.invalid(`${label} may already be ${is}. Change a limit.`, {
      tolerance: 'Nothing is changed.',
    })
  }
  for (const { batch, value } of initials) {
    if (value === null) continue
    const band = bandOn(tolerance, value)
    if (!isBeyondBand(band, value)) continue
    throw refuse.conflict(
      `The initial of ${batch} is ${shownWithUnit(attributeOf(attribute, planned), value)}, outside ${bandText(planned, band)}. A band holds its own initial; widen it.`,
      { kind: 'initial', batch },
    )
  }
  return {
    plan: {
      ...plan,
      attributes: plan.attributes.map((one) => (one.attribute === attribute ? next : one)),
    },
    sentence: `${label} may be ${is}; before it was ${was}.`,
  }
}

function isSame(one: Tolerance, other: Tolerance): boolean {
  const sides = (t: Tolerance) => (t.kind === 'range' ? [t.lower, t.upper] : [t.below, t.above])
  return one.kind === other.kind && sides(one).every((side, at) => side === sides(other)[at])
}

function bandOn(tolerance: Tolerance, initial: number) {
  try {
    return toleranceBand(tolerance, initial)
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    throw refuse.invalid('The lower limit must lie under the upper one. Correct one of them.', {
      tolerance: 'The limits leave no room.',
    })
  }
}
