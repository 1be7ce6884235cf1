import { grouped } from '@/lib/number/rules'
import { refuse } from '@/lib/http/errors'
import { isSamePlace, missingInPlan } from '@/lib/protocol/rules/faults'
import { jarsOfPlan, setAsideJars, stationName } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { jarsFromGrams } from '@/lib/science/jar-grams'
import { freedSentence, type Leaving } from '@/lib/station/rules/occupancy'
import type { StudyAdjustments } from '@/lib/study/schema'
import type { TakenBatches } from './jars'
import { startedPositions, waysToFit } from './plan'
import { placesNeeded, waysToStand } from './room'
import { asksForLamps, freeIn, hasLamps, type StationOffer } from './stations'
import { capital, counted } from './words'

export type BatchOffer = {
  id: string
  code: string
  state: string
  yieldG: number | null
  takenG: number
  /** A bought-in product. */
  isReference: boolean
}

export function refusePlan(plan: ProtocolPlan): void {
  const missing = missingInPlan(plan)
  if (missing) throw refuse.invalid(missing, { protocolVersionId: 'This protocol is not complete.' })
}

/** Which batches may take part, and as what. */
export function refuseBatches(
  plan: ProtocolPlan,
  batches: BatchOffer[],
  { batchIds, referenceIds }: TakenBatches,
): void {
  batches.forEach(refuseBatch)
  const of = (id: string) => batches.find((batch) => batch.id === id)!
  const both = referenceIds.find((id) => batchIds.includes(id))
  if (both) {
    throw refuse.invalid(
      `${of(both).code} is chosen as a batch of the study and as a reference beside it. Choose one of the two.`,
      { referenceIds: `${of(both).code} stands twice.` },
    )
  }
  const bought = batchIds.map(of).find((batch) => batch.isReference)
  if (bought) {
    throw refuse.invalid(
      `${bought.code} is a bought-in product, so it can only stand beside a study as a reference.`,
      { batchIds: `${bought.code} is a reference product.` },
    )
  }
  if (plan.batchMatrixing && batchIds.length < 2) {
    throw refuse.conflict(
      `This protocol measures ${plan.batchMatrixing} of the batches at a middle time point, by turns, so it takes at least two batches. Choose another batch, or a protocol that measures all.`,
      { kind: 'turns' },
    )
  }
}

function refuseBatch(batch: BatchOffer): void {
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

/** What a station's room is judged by besides the plan: who else stands there, and what was adjusted already. */
export type Room = {
  protocolPlan: ProtocolPlan
  adjustments: StudyAdjustments
  stations: StationOffer[]
  leavings: Leaving[]
  today: string
}

/** Every planned station needs one of the lab's, of its own, with room for all jars of all batches. */
export function refuseStations<T extends StationOffer>(
  plan: ProtocolPlan,
  chosen: (T | null)[],
  taken: TakenBatches,
  room: Room,
): T[] {
  plan.stations.forEach((planned, position) => {
    const station = chosen[position]
    if (!station) return
    refuseChoice(plan, planned, position, chosen)
    refuseFull(plan, position, chosen, taken, room)
  })
  return plan.stations.map((planned, position) => {
    const station = chosen[position]
    if (station) return station
    const name = stationName(planned, position)
    if (planned.light) {
      throw refuse.conflict(
        `No station of the lab at ${planned.temperatureC} °C has lamps, so none can be ${name}. Ask a manager to add one or to say which has them.`,
        { kind: 'station', position },
      )
    }
    throw refuse.conflict(
      `No station of the lab can be ${name}. Ask a manager to add one, or start without it.`,
      { kind: 'station', position },
    )
  })
}

function refuseChoice(
  plan: ProtocolPlan,
  planned: PlannedStation,
  position: number,
  chosen: (StationOffer | null)[],
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
  if (hasLamps(station) !== asksForLamps(planned)) {
    throw refuse.conflict(
      planned.light
        ? `${station.name} has no lamps on record, and ${name} needs them. Choose a station with lamps.`
        : `${station.name} has lamps, and ${name} stands in the dark. Choose a station without them.`,
      detail,
    )
  }
  refuseCycle(planned, station, detail)
  const isTwice = plan.stations.some(
    (other, at) => at !== position && chosen[at]?.id === station.id && isSamePlace(other, planned),
  )
  if (isTwice) {
    throw refuse.conflict(
      `${station.name} is chosen twice. Each station of a protocol needs its own.`,
      detail,
    )
  }
}

/** Jars stand from the start, so what leaves later makes no room now; the refusal says what would. */
function refuseFull(
  plan: ProtocolPlan,
  position: number,
  chosen: (StationOffer | null)[],
  taken: TakenBatches,
  { protocolPlan, adjustments, stations, leavings, today }: Room,
): void {
  const station = chosen[position]!
  const free = freeIn(station)
  const needed = placesNeeded(plan, chosen, station.id, taken)
  if (free >= needed) return
  const protocolPosition = startedPositions(protocolPlan, adjustments)[position]!
  const options = waysToStand(
    plan,
    adjustments,
    { position, protocolPosition },
    chosen,
    stations,
    taken,
    leavings,
    today,
  )
  const own = leavings.filter((one) => one.stationId === station.id)
  const freed = freedSentence(needed - free, today, own)
  const ways = options.filter(({ kind }) => kind !== 'day').map(({ label }) => lowered(label))
  throw refuse.conflict(
    [
      `${station.name} has ${counted(free, 'free place')}, ${needed} are needed.`,
      freed,
      ways.length > 0
        ? `What would fit: ${ways.join('; ')}.`
        : 'Ask a manager for another station, or make room there.',
    ]
      .filter(Boolean)
      .join(' '),
    { kind: 'station', position: protocolPosition, free, needed, options },
  )
}

function lowered(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1)
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
