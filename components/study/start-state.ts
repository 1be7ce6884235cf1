import { readDecimal } from '@/lib/number/rules'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { jarsOfPlan } from '@/lib/protocol/rules/plan'
import type { ProtocolRow } from '@/lib/protocol/queries'
import { startsAtZero } from '@/lib/reading/schema/attributes'
import { jarsFromGrams } from '@/lib/science/jar-grams'
import type { ReleasedBatch } from '@/lib/study/queries/batches'
import type { LabWorkload } from '@/lib/study/queries/workload'
import { adjustedPlan, waysToFit } from '@/lib/study/rules/plan'
import { chosenStations } from '@/lib/study/rules/stations'
import type { StationRow } from '@/lib/station/queries/stations'
import type { StartStudy, StudyAdjustments } from '@/lib/study/schema'

export type Offer = {
  batches: ReleasedBatch[]
  protocols: ProtocolRow[]
  stations: StationRow[]
  clients: { id: string; name: string }[]
  instruments: { id: string; code: string; name: string; kind: string; isActive: boolean }[]
  /** Its days, and what running studies ask of it already. */
  lab: LabWorkload
}

export type Draft = {
  title: string
  batchIds: string[]
  protocolVersionId: string
  stationIds: Record<number, string>
  adjustments: StudyAdjustments
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
  protocolVersionId: '',
  stationIds: {},
  adjustments: {},
  clientId: '',
  isShared: false,
  typed: {},
  isTorque: true,
  instrumentIds: {},
}

export function planOf(offer: Offer, draft: Draft): ProtocolPlan | null {
  const protocol = offer.protocols.find((one) => one.versionId === draft.protocolVersionId)
  return protocol ? adjustedPlan(protocol.plan, draft.adjustments) : null
}

/** Jars and grams of each chosen batch, and what would fit where one is short. */
export function needsOf(offer: Offer, draft: Draft) {
  const protocol = offer.protocols.find((one) => one.versionId === draft.protocolVersionId)
  if (!protocol) return []
  const plan = adjustedPlan(protocol.plan, draft.adjustments)
  return draft.batchIds.flatMap((id) => {
    const batch = offer.batches.find((one) => one.id === id)
    if (!batch) return []
    const leftG = Math.max(0.001, (batch.yieldG ?? 0) - batch.takenG)
    const need = jarsOfPlan(plan, leftG)
    const isShortAsPlanned = !jarsOfPlan(protocol.plan, leftG).fits
    return [
      {
        batch,
        leftG,
        plan,
        ...need,
        enoughFor: jarsFromGrams(leftG, plan.fillG, plan.lossPercent),
        options: isShortAsPlanned ? waysToFit(protocol.plan, leftG) : [],
      },
    ]
  })
}
export type Need = ReturnType<typeof needsOf>[number]

export function stationsOf(offer: Offer, draft: Draft, plan: ProtocolPlan) {
  const choices = Object.entries(draft.stationIds).map(([position, stationId]) => ({
    position: Number(position),
    stationId,
  }))
  return chosenStations(plan.stations, offer.stations, choices)
}

/** Attributes whose initial is typed: where the band is told from it, or it is not nothing by definition. */
export function initialAttributes(plan: ProtocolPlan) {
  return plan.attributes.filter(
    ({ attribute, tolerance }) => tolerance.kind !== 'range' || !startsAtZero(attribute),
  )
}

export function typedKey(batchId: string, attribute: string): string {
  return `${batchId} ${attribute}`
}

export function bodyOf(id: string, offer: Offer, draft: Draft): StartStudy {
  const plan = planOf(offer, draft)
  const protocol = offer.protocols.find((one) => one.versionId === draft.protocolVersionId)
  return {
    id,
    title: draft.title.trim() || protocol?.name || '',
    protocolVersionId: draft.protocolVersionId,
    batchIds: draft.batchIds,
    stationChoices: plan
      ? stationsOf(offer, draft, plan).flatMap((station, position) =>
          station ? [{ position, stationId: station.id }] : [],
        )
      : [],
    adjustments: draft.adjustments,
    clientId: draft.clientId || null,
    isShared: draft.clientId !== '' && draft.isShared,
    initialReadings: plan
      ? draft.batchIds.flatMap((batchId) =>
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

/** Why the study cannot be sent yet, in the order of the page; null where it can. */
export function whyNot(offer: Offer, draft: Draft): string | undefined {
  const plan = planOf(offer, draft)
  if (draft.batchIds.length === 0) return 'Choose a batch.'
  if (!plan) return 'Choose a protocol.'
  const short = needsOf(offer, draft).find((need) => !need.fits)
  if (short) return `${Math.ceil(short.shortG)} g short.`
  if (stationsOf(offer, draft, plan).includes(null)) return 'A station is missing.'
  const missing = draft.batchIds.some((batchId) =>
    initialAttributes(plan).some(
      ({ attribute }) =>
        !(draft.typed[typedKey(batchId, attribute)] ?? []).some((text) => readDecimal(text) !== null),
    ),
  )
  return missing ? 'An initial reading is missing.' : undefined
}
