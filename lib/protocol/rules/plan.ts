import { jarPlan, type JarPlanInput } from '@/lib/science/jar-plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'

/** What one batch must give: jars of each kind and grams, from a plan. */
export function jarsOfPlan(plan: ProtocolPlan, batchG: number) {
  return jarPlan(jarPlanInput(plan, batchG))
}

/** The plan as topic `jar-plan` takes it. */
export function jarPlanInput(plan: ProtocolPlan, batchG: number): JarPlanInput {
  return {
    stations: plan.stations.map((station, index) => ({
      name: stationName(station, index),
      timePoints: station.timePoints,
      watchJars: station.watchJars,
      measuringJarsPerPull: station.measuringJarsPerPull,
      spares: station.spares,
    })),
    initialJars: plan.initialJars,
    retains: plan.retains,
    fillG: plan.fillG,
    batchG,
    lossPercent: plan.lossPercent,
  }
}

export function jarsAtStation(station: PlannedStation): number {
  return station.watchJars + station.measuringJarsPerPull * station.timePoints.length + station.spares
}

export function stationName(station: PlannedStation, index: number): string {
  if (station.kind === 'freeze-thaw') return 'freeze-thaw'
  if (station.kind === 'transport') return 'transport'
  return station.temperatureC === null ? `station ${index + 1}` : `${station.temperatureC} °C`
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

/** Why a study cannot start from this plan yet, as a sentence; null where it can. */
export function missingInPlan(plan: ProtocolPlan): string | null {
  if (plan.stations.length === 0) return 'The protocol has no station yet. Add at least one to its plan.'
  if (plan.attributes.length === 0)
    return 'The protocol measures nothing yet. Add at least one attribute to its plan.'
  const idle = plan.stations.findIndex((station) => station.timePoints.length === 0)
  if (idle !== -1) {
    const name = stationName(plan.stations[idle]!, idle)
    return `The protocol has no time points at ${name}. Add them to its plan.`
  }
  const late = plan.stations.findIndex((station) => station.timePoints.some((week) => week > plan.endWeeks))
  if (late !== -1) {
    const name = stationName(plan.stations[late]!, late)
    return `A time point at ${name} lies after the study's end in week ${plan.endWeeks}. Move the end or the time point.`
  }
  const jarless = plan.stations.findIndex(
    (station) => station.watchJars === 0 && station.measuringJarsPerPull === 0,
  )
  if (jarless !== -1) {
    return `The protocol puts no jar at ${stationName(plan.stations[jarless]!, jarless)}. Give it a watch jar or measuring jars.`
  }
  return null
}
