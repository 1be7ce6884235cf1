import { jarPlan, type JarPlanInput } from '@/lib/science/jar-plan'
import type { PlannedAttribute, PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'

/** What one batch must give: jars of each kind and grams, from a plan. */
export function jarsOfPlan(plan: ProtocolPlan, batchG: number) {
  return jarPlan(jarPlanInput(plan, batchG))
}

/** The plan as topic `jar-plan` takes it. */
export function jarPlanInput(plan: ProtocolPlan, batchG: number): JarPlanInput {
  return {
    stations: plan.stations.map((station, index) => ({
      name: stationName(station, index),
      // A pull at which nothing is measured opens no jar.
      timePoints: askedWeeks(plan, station, 'measuring'),
      watchJars: station.watchJars,
      measuringJarsPerPull: station.measuringJarsPerPull,
      spares: station.spares,
    })),
    initialJars: plan.initialJars,
    retains: plan.retains + setAsideJars(plan),
    fillG: plan.fillG,
    batchG,
    lossPercent: plan.lossPercent,
  }
}

export function jarsAtStation(plan: Pick<ProtocolPlan, 'attributes'>, station: PlannedStation): number {
  const opened = askedWeeks(plan, station, 'measuring').length
  return station.watchJars + station.measuringJarsPerPull * opened + station.spares
}

/** Jars that each batch gives to outside laboratories. */
export function setAsideJars(plan: Pick<ProtocolPlan, 'setAside'>): number {
  return (plan.setAside ?? []).reduce((sum, { jars }) => sum + jars, 0)
}

/** What jars are pulled for, of one kind or of any; what is read only before the start is at no pull. */
export function pulledFor(
  plan: Pick<ProtocolPlan, 'attributes'>,
  jar?: 'watch' | 'measuring',
): PlannedAttribute[] {
  return plan.attributes.filter(
    (planned) =>
      !planned.isInitialOnly && (jar === undefined || attributeOf(planned.attribute, planned).jar === jar),
  )
}

/** Attributes that one kind of jar is asked for at one time point, in the plan's order. */
export function askedAt(
  plan: Pick<ProtocolPlan, 'attributes'>,
  station: Pick<PlannedStation, 'leftOut'> | undefined,
  week: number,
  jar?: 'watch' | 'measuring',
): PlannedAttribute[] {
  return pulledFor(plan, jar).filter(
    ({ attribute }) =>
      !(station?.leftOut ?? []).some((cell) => cell.week === week && cell.attribute === attribute),
  )
}

/** Time points at which this kind of jar has something to give. A plan without such an attribute pulls it all the same. */
export function askedWeeks(
  plan: Pick<ProtocolPlan, 'attributes'>,
  station: PlannedStation,
  jar: 'watch' | 'measuring',
): number[] {
  if (pulledFor(plan, jar).length === 0) return station.timePoints
  return station.timePoints.filter((week) => askedAt(plan, station, week, jar).length > 0)
}

export function stationName(station: PlannedStation, index: number): string {
  const name = station.kind === 'temperature' ? temperatureName(station, index) : station.kind
  return [name, variantOf(station)].filter(Boolean).join(', ')
}

function temperatureName({ temperatureC }: PlannedStation, index: number): string {
  return temperatureC === null ? `station ${index + 1}` : `${temperatureC} °C`
}

/** What sets a station's jars apart from upright ones in the plan's pack; empty where nothing does. */
export function variantOf({ light, orientation, isOwnPack }: PlannedStation): string {
  const lit = light === 'exposed' ? 'in light' : light === 'in foil' ? 'in light, wrapped in foil' : null
  return [lit, orientation, isOwnPack ? 'own pack' : null].filter(Boolean).join(', ')
}

/** The same for whoever stands before the jar, with the own pack by its name: "lying, own pack: airless pump". */
export function standsAs(variant: string, ownPack: string | undefined): string {
  return ownPack ? variant.replace('own pack', `own pack: ${ownPack}`) : variant
}

/** Weeks at which anything is pulled, each once, in order. */
export function weeksOfPlan(plan: ProtocolPlan): number[] {
  const weeks = new Set(plan.stations.flatMap((station) => station.timePoints))
  return [...weeks].toSorted((a, b) => a - b)
}

/** A pull is named as the lab speaks of it: cycles by number, quarters of a long study in months. */
export function pullLabel(station: PlannedStation, timeWeeks: number, endWeeks: number): string {
  if (station.kind === 'freeze-thaw') return `cycle ${station.timePoints.indexOf(timeWeeks) + 1}`
  if (station.kind === 'transport') return `leg ${station.timePoints.indexOf(timeWeeks) + 1}`
  return endWeeks > 52 && timeWeeks % 13 === 0 ? `month ${(timeWeeks / 13) * 3}` : `week ${timeWeeks}`
}
