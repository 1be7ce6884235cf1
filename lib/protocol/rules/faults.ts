import type { PlannedAttribute, PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { attributeName } from '@/lib/reading/schema/attributes'
import { askedAt, stationName, variantOf } from './plan'

/** What is wrong in a plan, and where. A draft may still be unfinished; what contradicts itself is not kept. */
export type PlanFault = { path: string; sentence: string; keepsFrom: 'saving' | 'starting' }

export function planFaults(plan: ProtocolPlan): PlanFault[] {
  const faults: PlanFault[] = []
  const add = (keepsFrom: PlanFault['keepsFrom'], path: string, sentence: string | null) => {
    if (sentence !== null) faults.push({ path, sentence, keepsFrom })
  }
  if (plan.stations.length === 0) {
    add('starting', 'plan.stations', 'The protocol has no station yet. Add at least one to its plan.')
  }
  if (plan.attributes.length === 0) {
    add(
      'starting',
      'plan.attributes',
      'The protocol measures nothing yet. Add at least one attribute to its plan.',
    )
  }
  plan.attributes.forEach((planned, index) => {
    add('saving', `plan.attributes.${index}.tolerance`, ownLimits(planned))
  })
  plan.stations.forEach((station, index) => {
    const name = stationName(station, index)
    const path = `plan.stations.${index}`
    add('starting', `${path}.timePoints`, idle(station, name))
    add('starting', `${path}.timePoints`, late(station, name, plan.endWeeks))
    add('starting', `${path}.watchJars`, jarless(station, name))
    add('starting', `${path}.timePoints`, unread(plan, station, name))
    add('starting', `${path}.light`, withoutPartner(plan, station, name))
    add('starting', `${path}.isOwnPack`, packless(plan, station, name))
    add('saving', `${path}.windowDays`, overlap(station, name))
    add('saving', `${path}.leftOut`, matrixedEdge(plan, station, name))
  })
  return faults
}

/** Why a study cannot start from this plan yet, as a sentence; null where it can. */
export function missingInPlan(plan: ProtocolPlan): string | null {
  return planFaults(plan)[0]?.sentence ?? null
}

function idle({ timePoints }: PlannedStation, name: string): string | null {
  return timePoints.length > 0 ? null : `The protocol has no time points at ${name}. Add them to its plan.`
}

function late({ timePoints }: PlannedStation, name: string, endWeeks: number): string | null {
  if (!timePoints.some((week) => week > endWeeks)) return null
  return `A time point at ${name} lies after the study's end in week ${endWeeks}. Move the end or the time point.`
}

function jarless({ watchJars, measuringJarsPerPull }: PlannedStation, name: string): string | null {
  if (watchJars > 0 || measuringJarsPerPull > 0) return null
  return `The protocol puts no jar at ${name}. Give it a watch jar or measuring jars.`
}

function unread(plan: ProtocolPlan, station: PlannedStation, name: string): string | null {
  if (plan.attributes.length === 0) return null
  const week = station.timePoints.find((one) => askedAt(plan, station, one).length === 0)
  if (week === undefined) return null
  return `Nothing is read at ${name} in week ${week}. Read something there, or take the time point out.`
}

/** Foil tells light from warmth only beside jars that have both. */
function withoutPartner(plan: ProtocolPlan, station: PlannedStation, name: string): string | null {
  if (station.light !== 'in foil') return null
  const isBeside = plan.stations.some(
    (other) => other.light === 'exposed' && other.temperatureC === station.temperatureC,
  )
  return isBeside
    ? null
    : `${name} has no jars in light beside it to compare with. Add the same station in light.`
}

/** A limit of an own attribute lies among what it can be. */
function ownLimits({ attribute, own, tolerance }: PlannedAttribute): string | null {
  if (!own) return null
  const name = attributeName(attribute)
  if (own.kind === 'scale') {
    if (tolerance.kind === 'range' && tolerance.upper !== undefined && own.words[tolerance.upper]) return null
    return `${name} is a scale: choose the worst word that is allowed.`
  }
  if (tolerance.kind !== 'range') return null
  const beyond = [tolerance.lower, tolerance.upper].find(
    (limit) => limit !== undefined && (limit < own.lower || limit > own.upper),
  )
  return beyond === undefined
    ? null
    : `${name} can be ${own.lower} to ${own.upper}, so a limit of ${beyond} says nothing. Change one of them.`
}

function packless(plan: ProtocolPlan, { isOwnPack }: PlannedStation, name: string): string | null {
  if (!isOwnPack || plan.ownPack) return null
  return `${name} uses the product's own pack, which is not named. Say what it is under Jars and rest.`
}

/** Windows are whole days, so two that share a day overlap: a jar pulled then would belong to either time point. */
export function overlap(
  { timePoints, windowDays }: Pick<PlannedStation, 'timePoints' | 'windowDays'>,
  name: string,
): string | null {
  const at = timePoints.findIndex(
    (week, index) => index > 0 && dayOf(week) - dayOf(timePoints[index - 1]!) <= 2 * windowDays,
  )
  if (at === -1) return null
  const [before, after] = [timePoints[at - 1]!, timePoints[at]!]
  const most = Math.ceil((dayOf(after) - dayOf(before)) / 2) - 1
  const act =
    most >= 0 ? `Make the window at most ${most} ${most === 1 ? 'day' : 'days'}` : 'Take one of them out'
  return `At ${name} the windows of week ${before} and week ${after} overlap. ${act}, or move a time point.`
}

function dayOf(week: number): number {
  return Math.round(week * 7)
}

/** Matrixing thins the middle only: the first and the last time carry the line [std: ICH Q1D]. */
function matrixedEdge(plan: ProtocolPlan, station: PlannedStation, name: string): string | null {
  const edges = [station.timePoints[0], station.timePoints.at(-1)]
  const cell = (station.leftOut ?? []).find(
    ({ attribute, week }) => edges.includes(week) && plan.matrixing?.attributes.includes(attribute),
  )
  if (!cell) return null
  return `${attributeName(cell.attribute)} is matrixed, so it is read at the first and the last time point of ${name}. Put week ${cell.week} back.`
}

/** Two stations of a plan may share one of the lab's only where their jars differ. */
export function isSamePlace(one: PlannedStation, other: PlannedStation): boolean {
  return (
    one.kind === other.kind && one.temperatureC === other.temperatureC && variantOf(one) === variantOf(other)
  )
}
