import * as z from '@/lib/http/zod'

const first = Date.UTC(1970, 0, 1)
const end = Date.UTC(2200, 0, 1)
const isWithin = (at: number) => at >= first && at < end

/**
 * A moment that a device or a person tells, kept in UTC: PostgreSQL refuses some offsets that the format allows, and
 * years far away turn into text that it cannot read. A tablet whose clock has begun anew in 1970 is still believed.
 */
export const instant = z.iso
  .datetime({ offset: true })
  .refine((text) => isWithin(Date.parse(text)), 'This time lies too far away. Check the clock of the device.')
  .transform((text) => new Date(text).toISOString())

/** A day of the calendar; `sentence` says what is asked for. */
export function calendarDay(sentence?: string) {
  return z.iso
    .date(sentence)
    .refine((text) => isWithin(Date.parse(text)), 'This day lies too far away. Type the year again.')
}
