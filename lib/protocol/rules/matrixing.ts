import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { batchMatrixingPrice } from './batch-matrixing'
import { stationName } from './plan'

/**
 * Reads these attributes at every second of the middle time points of each temperature station [std: ICH Q1D]. The
 * same times are left out at every station, because a drift is told from that of the coldest one on the same days.
 */
export function matrixed(plan: ProtocolPlan, attributes: AttributeKey[]): ProtocolPlan {
  const { matrixing: before, ...rest } = plan
  const stations = plan.stations.map((station) => {
    const { leftOut = [], ...without } = station
    const kept = leftOut.filter(({ attribute }) => !before?.attributes.includes(attribute))
    const cells = station.kind === 'temperature' ? thinned(station, attributes) : []
    const all = [...kept, ...cells]
    return all.length > 0 ? { ...without, leftOut: all } : without
  })
  return { ...rest, stations, ...(attributes.length > 0 ? { matrixing: { attributes } } : {}) }
}

/** At least three times must be left besides the initial, or there is no line to thin. */
function thinned({ timePoints }: PlannedStation, attributes: AttributeKey[]) {
  if (timePoints.length < 4) return []
  const weeks = timePoints.slice(1, -1).filter((_, index) => index % 2 === 0)
  return attributes.flatMap((attribute) => weeks.map((week) => ({ attribute, week })))
}

/** What can no longer be concluded from a plan that is bracketed or matrixed; empty where it is neither. */
export function priceOf(plan: ProtocolPlan): string[] {
  return [
    ...(plan.matrixing ? matrixingPrice(plan, plan.matrixing.attributes) : []),
    ...batchMatrixingPrice(plan),
    ...bracketingPrice(plan),
  ]
}

function matrixingPrice(plan: ProtocolPlan, attributes: AttributeKey[]): string[] {
  const names = attributes.map((key) => attributeName(key))
  const few = plan.stations.flatMap((station, index) => {
    const read = Math.min(...attributes.map((attribute) => readTimes(station, attribute)))
    return read + 1 < 5 ? [stationName(station, index)] : []
  })
  return [
    `${names.join(', ')}: at every second of the middle time points the value is not known. When a reading left its band is known only to the next time at which it is read.`,
    'A shelf life computed from fewer times has a wider confidence bound, so it comes out the same or shorter, and batches that differ are less likely to be found different.',
    'It is for attributes that vary little and move steadily; it shows nothing about a change that begins and ends between two readings.',
    ...(few.length > 0
      ? [
          `At ${few.join(', ')} fewer than five times are read, the initial among them: a slow drift there is never told ahead.`,
        ]
      : []),
  ]
}

function readTimes({ timePoints, leftOut = [] }: PlannedStation, attribute: AttributeKey): number {
  return timePoints.filter(
    (week) => !leftOut.some((cell) => cell.week === week && cell.attribute === attribute),
  ).length
}

function bracketingPrice({ bracketing }: ProtocolPlan): string[] {
  if (!bracketing) return []
  const { factor, low, high, between } = bracketing
  return [
    `Only ${low} and ${high} are tested. That ${between} is at least as stable as the worse of them is inferred, never shown.`,
    `Where the two differ, ${between} counts as no more stable than the worse one.`,
    `It holds only while nothing but the ${factor} differs: another closure, wall or formula between them voids it.`,
  ]
}
