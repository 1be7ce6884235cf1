import { grouped } from '@/lib/number/rules'
import { refuse } from '@/lib/http/errors'
import { isSamePlace, missingInPlan } from '@/lib/protocol/rules/faults'
import { jarsAtStation, jarsOfPlan, setAsideJars, stationName } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { jarsFromGrams } from '@/lib/science/jar-grams'
import { waysToFit } from './plan'
import { freeIn, type StationOffer } from './stations'
import { capital, counted } from './words'

export type BatchOffer = { id: string; code: string; state: string; yieldG: number | null; takenG: number }

export function refusePlan(plan: ProtocolPlan): void {
  const missing = missingInPlan(plan)
  if (missing) throw refuse.invalid(missing, { protocolVersionId: 'This protocol is not complete.' })
}

export function refuseBatch(batch: BatchOffer): void {
  if (batch.state === 'released') return
  const why =
    batch.state === 'rejected' ? 'was rejected, so no study can start on it' : `is still ${batch.state}`
  const act = batch.state === 'rejected' ? 'Choose another batch.' : 'Release it before a study starts on it.'
  throw refuse.conflict(`${batch.code} ${why}. ${act}`, { kind: 'batch state', batch: batch.code })
}

/** The batch must fill every jar; the refusal says how many grams are missing and what would fit. */
export function refuseShortBatch(plan: ProtocolPlan, batch: BatchOffer): void {
  const batchG = (batch.yieldG ?? 0) - batch.takenG
  // The jar plan computes with a positive mass; an empty batch is short of everything.
  const need = jarsOfPlan(plan, Math.max(batchG, 0.001))
  if (need.fits) return
  const enoughFor = jarsFromGrams(batchG, plan.fillG, plan.lossPercent)
  throw refuse.conflict(
    `${grams(need.shortG)} g are missing, so this study cannot start. ${capital(counted(need.jars, 'jar'))} of ${plan.fillG} g are ${grams(need.grams)} g with the loss; ${batch.code} has ${grams(batchG)} g left, enough for ${enoughFor}.`,
    {
      kind: 'batch short',
      batch: batch.code,
      batchG,
      enoughFor,
      ...need,
      initialJars: plan.initialJars,
      retains: plan.retains + setAsideJars(plan),
      options: batchG > 0 ? waysToFit(plan, batchG) : [],
    },
  )
}

/** Every planned station needs one of the lab's, of its own, with room for all jars of all batches. */
export function refuseStations<T extends StationOffer>(
  plan: ProtocolPlan,
  chosen: (T | null)[],
  batchCount: number,
): T[] {
  plan.stations.forEach((planned, position) => {
    const station = chosen[position]
    if (station) refuseChoice(plan, planned, position, chosen, batchCount)
  })
  return plan.stations.map((planned, position) => {
    const station = chosen[position]
    if (station) return station
    const name = stationName(planned, position)
    if (planned.light) {
      throw refuse.conflict(`No light station is chosen for ${name}. Choose the one whose lamps it means.`, {
        kind: 'station',
        position,
      })
    }
    throw refuse.conflict(
      `No station of the lab can be ${name}. Ask a manager to add one, or take it out of the protocol.`,
      { kind: 'station', position },
    )
  })
}

function refuseChoice(
  plan: ProtocolPlan,
  planned: PlannedStation,
  position: number,
  chosen: (StationOffer | null)[],
  batchCount: number,
): void {
  const station = chosen[position]!
  const name = stationName(planned, position)
  const detail = { kind: 'station', position }
  if (!station.isActive) {
    throw refuse.conflict(`${station.name} is out of use. Choose another station for ${name}.`, detail)
  }
  if (
    station.kind !== planned.kind ||
    (planned.kind === 'temperature' && station.temperatureC !== planned.temperatureC)
  ) {
    throw refuse.conflict(
      `${station.name} is no ${name} station. Choose one that keeps what the protocol asks for.`,
      detail,
    )
  }
  refuseCycle(planned, station, detail)
  const sharing = plan.stations.filter((_, other) => chosen[other]?.id === station.id)
  const isTwice = plan.stations.some(
    (other, at) => at !== position && chosen[at]?.id === station.id && isSamePlace(other, planned),
  )
  if (isTwice) {
    throw refuse.conflict(
      `${station.name} is chosen twice. Each station of a protocol needs its own.`,
      detail,
    )
  }
  // Upright and lying jars share their station's places.
  const needed = sharing.reduce((sum, one) => sum + jarsAtStation(plan, one), 0) * batchCount
  if (freeIn(station) < needed) {
    throw refuse.conflict(
      `${station.name} has ${counted(freeIn(station), 'free place')}, ${needed} are needed. Choose another station, or make room there.`,
      { ...detail, free: freeIn(station), needed },
    )
  }
}

function refuseCycle({ cycle }: PlannedStation, station: StationOffer, detail: object): void {
  const { cycleLowC = null, cycleHighC = null } = station
  if (!cycle || (cycleLowC === cycle.coldC && cycleHighC === cycle.warmC)) return
  const celsius = (value: number | null) => (value === null ? 'no set' : `${value} °C`).replace('-', '−')
  throw refuse.conflict(
    `${station.name} cycles between ${celsius(cycleLowC)} and ${celsius(cycleHighC)}, the protocol between ${celsius(cycle.coldC)} and ${celsius(cycle.warmC)}. Choose another station, or change the protocol's cycle.`,
    detail,
  )
}

function grams(value: number): string {
  return grouped(Math.ceil(value - 1e-9), 0)
}
