import { stationName } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { fitsFrom, type Leaving } from '@/lib/station/rules/occupancy'
import { capacityOf } from '@/lib/station/rules/places'
import type { StudyAdjustments } from '@/lib/study/schema'
import { nominalDay, spokenDay } from './calendar'
import { placesAt, plannedJars, plansOfBatches, type TakenBatches } from './jars'
import { pullsOf } from './pulls'
import { fittingStations, freeIn, type StationOffer } from './stations'
import { counted, numberWord } from './words'
import type { LabCalendar } from './working-days'

/** What would let a study stand where it does not fit; one that only waits has nothing to press. */
export type RoomOption = { kind: 'station' | 'spares' | 'batches' | 'without' | 'day'; label: string } & {
  stationId?: string
  adjustments?: StudyAdjustments
  batches?: number
}

/** The jars that a plan puts on the places of one of the lab's stations: upright and lying ones share them. */
export function placesNeeded(
  plan: ProtocolPlan,
  chosen: (StationOffer | null)[],
  stationId: string,
  { batchIds, referenceIds }: TakenBatches,
): number {
  const plans = plansOfBatches(plan, batchIds, referenceIds)
  const sharing = plan.stations.flatMap((_, position) =>
    chosen[position]?.id === stationId ? [position] : [],
  )
  return sharing.reduce((sum, position) => sum + placesAt(plans, position), 0)
}

/** When the jars of a study that starts today would leave this station, as far as its plan tells. */
export function plannedLeavings(
  plan: ProtocolPlan,
  chosen: (StationOffer | null)[],
  stationId: string,
  { batchIds, referenceIds }: TakenBatches,
  today: string,
): Pick<Leaving, 'leavesOn' | 'jars'>[] {
  const endOn = nominalDay(today, plan.endWeeks)
  return plannedJars(plan, batchIds, referenceIds).flatMap((jar) => {
    if (jar.position === null || chosen[jar.position]?.id !== stationId) return []
    const [week] = jar.weeks
    const leavesOn = jar.kind === 'measuring' && week !== undefined ? nominalDay(today, week) : endOn
    return [{ leavesOn, jars: 1 }]
  })
}

/** The least first: another station, fewer spares, fewer batches, without the station, later. */
export function waysToStand(
  plan: ProtocolPlan,
  adjustments: StudyAdjustments,
  at: { position: number; protocolPosition: number },
  chosen: (StationOffer | null)[],
  stations: StationOffer[],
  taken: TakenBatches,
  leavings: Leaving[],
  today: string,
): RoomOption[] {
  const planned = plan.stations[at.position]!
  const station = chosen[at.position]!
  const name = stationName(planned, at.position)
  const needed = placesNeeded(plan, chosen, station.id, taken)
  const short = needed - freeIn(station)
  const own = placesAt(plansOfBatches(plan, taken.batchIds, taken.referenceIds), at.position)
  const batchCount = taken.batchIds.length + taken.referenceIds.length
  return [
    ...otherStations(planned, station, stations, own),
    ...fewerSpares(planned, name, adjustments, at.protocolPosition, short, batchCount),
    ...fewerBatches(plan, chosen, station, taken),
    ...(plan.stations.length > 1
      ? [
          {
            kind: 'without' as const,
            label: `Start without ${name}`,
            adjustments: {
              ...adjustments,
              leaveOutStations: [...(adjustments.leaveOutStations ?? []), at.protocolPosition],
            },
          },
        ]
      : []),
    ...later(station, needed, leavings, today),
  ]
}

function otherStations(
  planned: PlannedStation,
  station: StationOffer,
  stations: StationOffer[],
  needed: number,
): RoomOption[] {
  return fittingStations(planned, stations)
    .filter((other) => other.id !== station.id && freeIn(other) >= needed)
    .toSorted((a, b) => freeIn(b) - freeIn(a))
    .slice(0, 2)
    .map((other) => ({
      kind: 'station',
      label: `Use ${other.name}, ${counted(freeIn(other), 'free place')}`,
      stationId: other.id,
    }))
}

function fewerSpares(
  { spares }: PlannedStation,
  name: string,
  adjustments: StudyAdjustments,
  position: number,
  short: number,
  batchCount: number,
): RoomOption[] {
  const fewer = Math.ceil(short / batchCount)
  if (fewer > spares) return []
  const left = spares - fewer
  return [
    {
      kind: 'spares',
      label: `${left === 0 ? 'No spare' : counted(left, 'spare')} instead of ${numberWord(spares)} for each batch at ${name}`,
      adjustments: {
        ...adjustments,
        spares: [
          ...(adjustments.spares ?? []).filter((one) => one.position !== position),
          { position, spares: left },
        ],
      },
    },
  ]
}

/** Of the study's own batches; what stands beside them stays. */
function fewerBatches(
  plan: ProtocolPlan,
  chosen: (StationOffer | null)[],
  station: StationOffer,
  { batchIds, referenceIds }: TakenBatches,
): RoomOption[] {
  const batchCount = batchIds.length
  const fitting =
    batchIds.findLastIndex(
      (_, last) =>
        placesNeeded(plan, chosen, station.id, { batchIds: batchIds.slice(0, last + 1), referenceIds }) <=
        freeIn(station),
    ) + 1
  if (fitting < (plan.batchMatrixing ? 2 : 1) || fitting >= batchCount) return []
  return [
    {
      kind: 'batches',
      label: `Start with ${counted(fitting, 'batch', 'batches')} instead of ${numberWord(batchCount)}`,
      batches: fitting,
    },
  ]
}

function later(station: StationOffer, needed: number, leavings: Leaving[], today: string): RoomOption[] {
  const own = leavings.filter((one) => one.stationId === station.id)
  const day = fitsFrom(capacityOf(station), needed, today, own)
  return day === null ? [] : [{ kind: 'day', label: `Start on ${spokenDay(day)}: then it would fit` }]
}

export type TouchedDowntime = { fromOn: string; toOn: string; reason: string; pulls: string[] }

/** The pulls of a study starting today that fall into a time in which its station is out of use. */
export function pullsInDowntime(
  planned: PlannedStation,
  endWeeks: number,
  today: string,
  calendar: LabCalendar,
  downtimes: { fromOn: string; toOn: string; reason: string }[],
): TouchedDowntime[] {
  const pulls = pullsOf(planned, today, endWeeks, calendar)
  return downtimes.flatMap(({ fromOn, toOn, reason }) => {
    const touched = pulls.filter(({ dueOn }) => dueOn >= fromOn && dueOn <= toOn)
    return touched.length === 0 ? [] : [{ fromOn, toOn, reason, pulls: touched.map(({ label }) => label) }]
  })
}
