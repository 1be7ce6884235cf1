import { instrumentDay, type InstrumentDay } from '@/lib/science/instrument-day'
import { mean } from '@/lib/science/mean'
import { dayIn, weeksBetween } from '@/lib/study/rules/calendar'
import type { Frame, FrameReading } from '../queries/frame'
import type { Unit } from './input'

export const commonShift = 'common shift'

/** One instrument, one attribute, one day: everything it read lay off to the same side. */
export type ShiftedDay = {
  instrumentId: string
  attribute: string
  day: string
  reason: string
  /** What a person decided about it. */
  settles: 'doubt' | 'reading' | null
  /** When it was first named: a repeat read after that comes from an instrument that was looked at. Null before. */
  namedAt: string | null
  atWeeks: number
  direction: 'high' | 'low'
  evidence: InstrumentDay['evidence'] & { median: number | null; direction: string }
}

type Mark = { unit: Unit; day: string; instrumentId: string | null; value: number; row: FrameReading }

/** Looks at each day in turn; a day found shifted takes no part in what is expected of the later ones. */
export function shiftedDays(frame: Frame, units: readonly Unit[]): ShiftedDay[] {
  const marks = units.flatMap((unit) => marksOf(unit, frame.study.zone))
  const found: ShiftedDay[] = []
  for (const { day, attribute, instrumentId } of daysOf(marks)) {
    const earlier = marks.filter(
      (mark) =>
        mark.unit.attribute === attribute &&
        mark.day < day &&
        !found.some((shift) => shift.settles !== 'doubt' && isMarkOf(shift, mark)),
    )
    const flags = flagsOf(frame, instrumentId, attribute, day)
    const namedAt = flags[0]?.raisedAt ?? null
    const today = marks.filter(
      (mark) =>
        mark.unit.attribute === attribute &&
        mark.day === day &&
        mark.instrumentId === instrumentId &&
        !isFreshRepeat(namedAt, mark.row),
    )
    const shift = judge(frame, attribute, day, earlier, today)
    if (shift.level !== 'doubt' || shift.direction === null) continue
    found.push({
      instrumentId,
      attribute,
      day,
      reason: `the instrument read ${shift.direction} everywhere that day`,
      settles: (flags.findLast((flag) => flag.settles !== null)?.settles as ShiftedDay['settles']) ?? null,
      namedAt,
      atWeeks: weeksBetween(frame.study.startedAt, day),
      direction: shift.direction,
      evidence: { ...shift.evidence, median: shift.median, direction: shift.direction },
    })
  }
  return found
}

export function isOnShiftedDay(shift: ShiftedDay, reading: FrameReading, zone: string): boolean {
  return (
    reading.attribute === shift.attribute &&
    reading.instrumentId === shift.instrumentId &&
    reading.studyStationId !== null &&
    dayIn(zone, reading.measuredAt) === shift.day &&
    !isFreshRepeat(shift.namedAt, reading)
  )
}

/** Read again after the day was named: it counts, and says nothing of how the instrument read before. */
function isFreshRepeat(namedAt: string | null, reading: FrameReading): boolean {
  return namedAt !== null && reading.repeatOf !== null && Date.parse(reading.measuredAt) > Date.parse(namedAt)
}

function judge(frame: Frame, attribute: string, day: string, earlier: Mark[], today: Mark[]): InstrumentDay {
  const at = weeksBetween(frame.study.startedAt, day)
  const units = [...new Set(today.map((mark) => mark.unit))]
  const stations = units.map((unit) => {
    const own = [...earlier, ...today].filter((mark) => mark.unit === unit)
    return {
      name: `${unit.batch.code} at ${unit.station.name}`,
      temperatureC: unit.station.temperatureC!,
      times: own.map((mark) => weeksBetween(frame.study.startedAt, mark.day)),
      // In repeatability SDs, so that batches of different viscosity can be judged together.
      values: own.map((mark) => mark.value / unit.input.repeatabilitySd),
    }
  })
  const ages = units.map((unit) => 7 * weeksBetween(unit.batch.madeAt ?? frame.study.startedAt, day))
  return instrumentDay({
    stations,
    at,
    repeatabilitySd: 1,
    ...(attribute === 'viscosity' ? { daysSinceMaking: Math.min(...ages) } : {}),
  })
}

function marksOf(unit: Unit, zone: string): Mark[] {
  if (unit.station.temperatureC === null || unit.station.isFreezeThaw || unit.input.repeatabilitySd <= 0)
    return []
  return unit.input.readings.flatMap((reading, index) => {
    if (reading.isSetAside || reading.doubts.some((doubt) => !doubt.settled)) return []
    const row = unit.jars[index]!.rows[0]!
    const day = dayIn(zone, row.measuredAt)
    return [{ unit, day, instrumentId: row.instrumentId, value: mean(reading.values), row }]
  })
}

function daysOf(marks: Mark[]): { day: string; attribute: string; instrumentId: string }[] {
  const seen = new Map<string, { day: string; attribute: string; instrumentId: string }>()
  for (const { unit, day, instrumentId } of marks) {
    if (instrumentId)
      seen.set(`${day} ${unit.attribute} ${instrumentId}`, { day, attribute: unit.attribute, instrumentId })
  }
  return [...seen.entries()].toSorted(([a], [b]) => a.localeCompare(b)).map(([, found]) => found)
}

function isMarkOf(shift: ShiftedDay, mark: Mark): boolean {
  return (
    shift.day === mark.day &&
    shift.instrumentId === mark.instrumentId &&
    shift.attribute === mark.unit.attribute &&
    !isFreshRepeat(shift.namedAt, mark.row)
  )
}

function flagsOf(frame: Frame, instrumentId: string, attribute: string, day: string): Frame['flags'] {
  return frame.flags.filter(
    (one) =>
      one.rule === commonShift &&
      one.instrumentId === instrumentId &&
      one.attribute === attribute &&
      one.onDay === day,
  )
}
