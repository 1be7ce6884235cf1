import type { EntryDoubt } from '@/lib/reading/rules/entry-doubts'
import { spokenDay } from '@/lib/study/rules/calendar'

/** A calibration or a daily check, with what it showed; a calibration holds until it is due again. */
export type InstrumentEvent = {
  kind: 'calibration' | 'check'
  at: string
  result: string
  sentence: string
  dueOn?: string | null
}

/**
 * The calibration that held when something was read: the last one until then, for what is told later belongs to its own
 * time. What was read before the first one on record goes by that; nulls where there is none.
 */
export function calibrationAt(
  { events }: { events: readonly InstrumentEvent[] },
  measuredAt: string,
): { dueOn: string | null; result: string | null } {
  const calibrations = events
    .filter((event) => event.kind === 'calibration')
    .toSorted((a, b) => Date.parse(a.at) - Date.parse(b.at))
  const held =
    calibrations.findLast((event) => Date.parse(event.at) <= Date.parse(measuredAt)) ?? calibrations[0]
  return { dueOn: held?.dueOn ?? null, result: held?.result ?? null }
}

/** Doubts on readings that a later calibration or check brings are told apart from those known at the time. */
export const laterCheck = 'later check'

/** What the daily checks say of a reading: the last one before it failed, or the next one after it was bad. */
export function checkDoubts(
  instrument: { code: string; events: readonly InstrumentEvent[] },
  measuredAt: string,
  dayOf: (instant: string) => string,
): EntryDoubt[] {
  const events = instrument.events.toSorted((a, b) => Date.parse(a.at) - Date.parse(b.at))
  const isBefore = (event: InstrumentEvent) => Date.parse(event.at) <= Date.parse(measuredAt)
  const before = events.filter(isBefore)
  const failed = before.findLast((event) => event.kind === 'check' || event.result === 'good')
  if (failed?.result === 'doubtful') {
    return [
      {
        reason: 'calibration',
        sentence: `${instrument.code} failed its daily check on ${spokenDay(dayOf(failed.at))}: ${failed.sentence} Check it and measure again.`,
      },
    ]
  }
  const next = events.find((event) => !isBefore(event))
  return next?.result === 'doubtful' ? [laterDoubt(instrument.code, next, dayOf(next.at))] : []
}

export function laterDoubt(
  code: string,
  event: Pick<InstrumentEvent, 'kind' | 'sentence'>,
  day: string,
): EntryDoubt {
  return {
    reason: laterCheck,
    sentence: `A ${event.kind === 'check' ? 'daily check' : 'calibration'} of ${code} on ${spokenDay(day)} was bad, and this was read since its last good one: ${event.sentence} Measure again.`,
  }
}
