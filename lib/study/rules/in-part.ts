import { stationName } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { refuse } from '@/lib/http/errors'
import type { StudyAdjustments } from '@/lib/study/schema'
import { placesAt, plansOfBatches, type TakenBatches } from './jars'
import { startedPositions } from './plan'
import { fittingStations, freeIn, roomiest, type StationOffer } from './stations'
import { capital, counted, numberWord } from './words'

export type NotStarted = { position: number; sentence: string }

/** A study that starts in part says which part did not, why, and that it was the person's choice. */
export function refuseInPart(plan: ProtocolPlan, adjustments: StudyAdjustments, why: string): void {
  const leftOut = adjustments.leaveOutStations ?? []
  const named = [...leftOut, ...(adjustments.spares ?? []).map((one) => one.position)]
  if (named.some((position) => position >= plan.stations.length)) {
    throw refuse.invalid('The protocol has no such station. Reload, and choose from its own.', {
      adjustments: 'A station is not in the protocol.',
    })
  }
  if (leftOut.length === 0) return
  if (startedPositions(plan, adjustments).length === 0) {
    throw refuse.invalid('No station is left to start at. Keep at least one.', {
      adjustments: 'Every station is left out.',
    })
  }
  if (why === '') {
    throw refuse.invalid('The study starts without a station that its protocol asks for. Say why.', {
      whyInPart: 'Say why these stations do not start.',
    })
  }
}

/** What the record says of each station that the protocol asks for and the study does not have. */
export function notStarted(
  plan: ProtocolPlan,
  adjustments: StudyAdjustments,
  stations: StationOffer[],
  { batchIds, referenceIds }: TakenBatches,
): NotStarted[] {
  const plans = plansOfBatches(plan, batchIds, referenceIds)
  return [...new Set(adjustments.leaveOutStations ?? [])]
    .toSorted((a, b) => a - b)
    .map((position) => {
      const planned = plan.stations[position]!
      const needed = placesAt(plans, position)
      const station = roomiest(fittingStations(planned, stations))
      const cause =
        station === null
          ? 'no station of the lab keeps it'
          : freeIn(station) < needed
            ? `${station.name} had ${counted(freeIn(station), 'free place')} and ${numberWord(needed)} were needed`
            : 'by choice'
      const name = capital(stationName(planned, position))
      return {
        position,
        sentence: `${name} was planned by the protocol, where it ${planned.voice}, and was not started: ${cause}.`,
      }
    })
}
