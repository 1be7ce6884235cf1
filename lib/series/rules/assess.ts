import { assessSeries } from '@/lib/science/drift'
import { ScienceError } from '@/lib/science/guard'
import type { ColdestStation, SeriesFinding, SeriesInput } from '@/lib/science/series'
import type { Frame } from '../queries/frame'
import { seriesUnits, type Unit } from './input'
import { shiftedDays, type ShiftedDay } from './shifted-day'

/** What the rules were given, with the coldest other station, and what they found. */
export type Assessed = { unit: Unit; input: SeriesInput; finding: SeriesFinding }

/** All series of these attributes (all of the study's where null) and the days on which an instrument was off. */
export function assessStudy(
  frame: Frame,
  only: ReadonlySet<string> | null,
): { assessed: Assessed[]; shifted: ShiftedDay[] } {
  const shifted = shiftedDays(frame, seriesUnits(frame, only, []))
  const units = seriesUnits(frame, only, shifted)
  const cold = new Map(units.map((unit) => [unit, asColdest(unit)]))
  const assessed = units.flatMap((unit) => {
    const coldest = coldestOther(unit, units, cold)
    const input = coldest ? { ...unit.input, coldest } : unit.input
    const finding = assess(input)
    return finding ? [{ unit, input, finding }] : []
  })
  return { assessed, shifted }
}

/** Null where the protocol's tolerance gives no band on this initial: then there is nothing to stand in. */
function assess(input: Unit['input']): SeriesFinding | null {
  try {
    return assessSeries(input)
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

/** The means of the coldest other station of the same batch and attribute: it shares instrument and day, not the heat. */
function coldestOther(
  unit: Unit,
  units: readonly Unit[],
  cold: ReadonlyMap<Unit, ColdestStation | null>,
): ColdestStation | null {
  const others = units
    .filter(
      (other) =>
        other !== unit &&
        other.batch.id === unit.batch.id &&
        other.attribute === unit.attribute &&
        other.station.temperatureC !== null &&
        !other.station.isFreezeThaw &&
        cold.get(other) !== null,
    )
    .toSorted((a, b) => a.station.temperatureC! - b.station.temperatureC!)
  return others[0] ? cold.get(others[0])! : null
}

function asColdest(unit: Unit): ColdestStation | null {
  const points = (assess(unit.input)?.points ?? []).filter((point) => point.counted && !point.isInitial)
  if (points.length === 0) return null
  return {
    times: points.map((point) => point.time),
    values: points.map((point) => point.mean),
    days: points.map((point) => point.day!),
  }
}

/** Doubts that the rules find again at each computation, so an entry's own note of them raises nothing. */
export const ownRules: ReadonlySet<string> = new Set(['jump', 'spread', 'out'])
