import { readDecimal } from '@/lib/number/rules'
import type { PlannedAttribute, ProtocolPlan } from '@/lib/protocol/schema'
import { jarsOfPlan, stationName } from '@/lib/protocol/rules/plan'
import type { ProtocolRow } from '@/lib/protocol/queries'
import { startsAtZero, attributeOf, toldFromInitial, readByText } from '@/lib/reading/schema/attributes'
import { jarsFromGrams } from '@/lib/science/jar-grams'
import type { ReleasedBatch } from '@/lib/study/queries/batches'
import type { LabWorkload } from '@/lib/study/queries/workload'
import { occupancy, type Leaving } from '@/lib/station/rules/occupancy'
import { placesAt, plansOfBatches, type TakenBatches } from '@/lib/study/rules/jars'
import { adjustedPlan, startedChoices, startedPositions } from '@/lib/study/rules/plan'
import { placesNeeded, plannedLeavings, pullsInDowntime, waysToStand } from '@/lib/study/rules/room'
import { savingsOf, type Saving } from '@/lib/study/rules/savings'
import { chosenStations, fittingStations, freeIn } from '@/lib/study/rules/stations'
import type { StationRow } from '@/lib/station/queries/stations'
import type { StartStudy, StudyAdjustments } from '@/lib/study/schema'

export type Offer = {
  batches: ReleasedBatch[]
  protocols: ProtocolRow[]
  stations: StationRow[]
  /** Who leaves which station when, and when stations are out of use. */
  leavings: Leaving[]
  downtimes: { stationId: string; fromOn: string; toOn: string; reason: string }[]
  clients: { id: string; name: string }[]
  instruments: { id: string; code: string; name: string; kind: string; isActive: boolean }[]
  /** Its days, and what running studies ask of it already. */
  lab: LabWorkload
}

export type Draft = {
  title: string
  batchIds: string[]
  /** What stands beside them for comparison. */
  referenceIds: string[]
  protocolVersionId: string
  /** By the station's position in the protocol. */
  stationIds: Record<number, string>
  adjustments: StudyAdjustments
  whyInPart: string
  clientId: string
  isShared: boolean
  /** By batch and attribute: one text a replicate. */
  typed: Record<string, string[]>
  isTorque: boolean
  instrumentIds: Record<string, string>
}

export const emptyDraft: Draft = {
  title: '',
  batchIds: [],
  referenceIds: [],
  protocolVersionId: '',
  stationIds: {},
  adjustments: {},
  whyInPart: '',
  clientId: '',
  isShared: false,
  typed: {},
  isTorque: true,
  instrumentIds: {},
}

export function planOf(offer: Offer, draft: Draft): ProtocolPlan | null {
  const protocol = protocolOf(offer, draft)
  return protocol ? adjustedPlan(protocol.plan, draft.adjustments) : null
}

/** The batches of the study and what stands beside it: all that are filled and read. */
export function takenBatches({ batchIds, referenceIds }: Draft): string[] {
  return [...batchIds, ...referenceIds]
}

/** Whose jars are counted: before a batch is chosen, those of one. */
export function countedBatches({ batchIds, referenceIds }: Draft): TakenBatches {
  return { batchIds: batchIds.length > 0 ? batchIds : [''], referenceIds }
}

/** Jars and grams of each chosen batch. */
export function needsOf(offer: Offer, draft: Draft) {
  const all = planOf(offer, draft)
  if (!all) return []
  return plansOfBatches(all, draft.batchIds, draft.referenceIds).flatMap(({ batchId, plan }) => {
    const batch = offer.batches.find((one) => one.id === batchId)
    if (!batch) return []
    const leftG = leftOf(batch)
    return [
      {
        batch,
        isReference: draft.referenceIds.includes(batchId),
        leftG,
        plan,
        ...jarsOfPlan(plan, leftG),
        enoughFor: jarsFromGrams(leftG, plan.fillG, plan.lossPercent),
      },
    ]
  })
}
export type Need = ReturnType<typeof needsOf>[number]

function leftOf(batch: ReleasedBatch): number {
  return Math.max(0.001, (batch.yieldG ?? 0) - batch.takenG)
}

/** Where this study could take less, what would make the shortest batch do among it. */
export function savingsFor(offer: Offer, draft: Draft): Saving[] {
  const protocol = protocolOf(offer, draft)
  if (!protocol || draft.batchIds.length === 0) return []
  const { leaveOutStations } = draft.adjustments
  const started = adjustedPlan(protocol.plan, leaveOutStations ? { leaveOutStations } : {})
  const short = plansOfBatches(started, draft.batchIds, draft.referenceIds).flatMap(({ batchId, plan }) => {
    const batch = offer.batches.find((one) => one.id === batchId)
    return batch && !jarsOfPlan(plan, leftOf(batch)).fits ? [leftOf(batch)] : []
  })
  return savingsOf(protocol.plan, draft.adjustments, draft, short.length > 0 ? Math.min(...short) : null)
}

function protocolOf(offer: Offer, draft: Draft): ProtocolRow | undefined {
  return offer.protocols.find((one) => one.versionId === draft.protocolVersionId)
}

/** The lab's station for each that starts, in the order of the study's own plan. */
function stationsOf(offer: Offer, draft: Draft, protocol: ProtocolRow, plan: ProtocolPlan) {
  const choices = Object.entries(draft.stationIds).map(([position, stationId]) => ({
    position: Number(position),
    stationId,
  }))
  return chosenStations(
    plan.stations,
    offer.stations,
    startedChoices(protocol.plan, draft.adjustments, choices),
  )
}

/** Each station of the protocol: where it would stand, whether there is room, and what would make some. */
export function placesOf(offer: Offer, draft: Draft) {
  const protocol = protocolOf(offer, draft)
  if (!protocol) return []
  const plan = adjustedPlan(protocol.plan, draft.adjustments)
  const started = startedPositions(protocol.plan, draft.adjustments)
  const chosen = stationsOf(offer, draft, protocol, plan)
  const taken = countedBatches(draft)
  const { leavings } = offer
  const { today, calendar } = offer.lab
  return protocol.plan.stations.map((asked, protocolPosition) => {
    const position = started.indexOf(protocolPosition)
    const planned = plan.stations[position] ?? asked
    const station = position === -1 ? null : (chosen[position] ?? null)
    const own = leavings.filter((one) => one.stationId === station?.id)
    const needed = station
      ? placesNeeded(plan, chosen, station.id, taken)
      : placesAt(plansOfBatches(protocol.plan, taken.batchIds, taken.referenceIds), protocolPosition)
    const isFull = station !== null && freeIn(station) < needed
    return {
      protocolPosition,
      planned,
      name: stationName(planned, protocolPosition),
      isStarted: position !== -1,
      station,
      fitting: fittingStations(planned, offer.stations),
      needed,
      isFull,
      options: isFull
        ? waysToStand(
            plan,
            draft.adjustments,
            { position, protocolPosition },
            chosen,
            offer.stations,
            taken,
            leavings,
            today,
          )
        : [],
      before: occupancy(today, own),
      after: occupancy(
        today,
        station ? [...own, ...plannedLeavings(plan, chosen, station.id, taken, today)] : own,
      ),
      downtimes: station
        ? pullsInDowntime(
            planned,
            plan.endWeeks,
            today,
            calendar,
            offer.downtimes.filter((one) => one.stationId === station.id),
          )
        : [],
    }
  })
}
export type StartPlace = ReturnType<typeof placesOf>[number]

/** Attributes whose initial is typed: where the band is told from it, or it is not nothing by definition. */
export function initialAttributes(plan: ProtocolPlan) {
  return plan.attributes.filter(
    (planned) =>
      planned.isInitialOnly ||
      toldFromInitial(planned) ||
      planned.tolerance.kind !== 'range' ||
      !startsAtZero(attributeOf(planned.attribute, planned)),
  )
}

export function typedKey(batchId: string, attribute: string): string {
  return `${batchId} ${attribute}`
}

export function bodyOf(id: string, offer: Offer, draft: Draft): StartStudy {
  const plan = planOf(offer, draft)
  const protocol = protocolOf(offer, draft)
  return {
    id,
    title: draft.title.trim() || protocol?.name || '',
    protocolVersionId: draft.protocolVersionId,
    batchIds: draft.batchIds,
    referenceIds: draft.referenceIds,
    stationChoices: placesOf(offer, draft).flatMap(({ station, protocolPosition }) =>
      station ? [{ position: protocolPosition, stationId: station.id }] : [],
    ),
    adjustments: draft.adjustments,
    whyInPart: draft.whyInPart,
    clientId: draft.clientId || null,
    isShared: draft.clientId !== '' && draft.isShared,
    initialReadings: plan
      ? takenBatches(draft).flatMap((batchId) =>
          initialAttributes(plan).flatMap(({ attribute }) => {
            const typed = (draft.typed[typedKey(batchId, attribute)] ?? []).filter(
              (text) => text.trim() !== '',
            )
            if (typed.length === 0) return []
            return [
              {
                batchId,
                attribute,
                typed,
                isTorque: attribute === 'viscosity' && draft.isTorque,
                instrumentId: draft.instrumentIds[attribute] || null,
              },
            ]
          }),
        )
      : [],
  }
}

/** Whether something was typed that may be a reading; what it is worth the server says. */
function isRead({ attribute, own }: PlannedAttribute, text: string): boolean {
  const { kind } = attributeOf(attribute, { own })
  return readByText.has(kind) ? text.trim() !== '' : readDecimal(text) !== null
}

/** Why the study cannot be sent yet, in the order of the page; null where it can. */
export function whyNot(offer: Offer, draft: Draft): string | undefined {
  const plan = planOf(offer, draft)
  if (draft.batchIds.length === 0) return 'Choose a batch.'
  if (!plan) return 'Choose a protocol.'
  if (plan.batchMatrixing && draft.batchIds.length < 2) {
    return 'Its batches are measured by turns: choose at least two.'
  }
  const short = needsOf(offer, draft).find((need) => !need.fits)
  if (short) return `${Math.ceil(short.shortG)} g short.`
  const places = placesOf(offer, draft)
  if (places.some((place) => place.isStarted && place.station === null)) return 'A station is missing.'
  const full = places.find((place) => place.isFull)
  if (full?.station) return `${full.station.name} has not enough places.`
  if (places.every((place) => !place.isStarted)) return 'No station starts.'
  if (places.some((place) => !place.isStarted) && draft.whyInPart.trim() === '')
    return 'Say why it starts in part.'
  const missing = takenBatches(draft).some((batchId) =>
    initialAttributes(plan).some(
      (planned) =>
        !(planned.isInitialOnly && planned.tolerance.kind === 'range') &&
        !(draft.typed[typedKey(batchId, planned.attribute)] ?? []).some((text) => isRead(planned, text)),
    ),
  )
  return missing ? 'An initial reading is missing.' : undefined
}
