import { describe, expect, it } from 'vitest'
import { calendarDay, instant } from '@/lib/time/schema'

describe('moments and days that somebody tells', () => {
  it('a moment is kept in UTC, whatever its offset; an offset that PostgreSQL refuses is no fault', () => {
    expect(instant.parse('2026-12-01T10:00:00+23:59')).toBe('2026-11-30T10:01:00.000Z')
    expect(instant.parse('2026-03-01T00:30:00.250+01:00')).toBe('2026-02-28T23:30:00.250Z')
  })

  it('a clock that has begun anew in 1970 is believed; years that the record cannot hold are not', () => {
    expect(instant.safeParse('1970-01-01T00:00:05Z').success).toBe(true)
    for (const far of ['0001-01-01T00:00:00Z', '9999-12-31T23:59:59Z', '1969-12-31T23:59:59Z'])
      expect(instant.safeParse(far).success, far).toBe(false)
    for (const wrong of ['2026-02-30T00:00:00Z', '2026-12-01', 'now', ''])
      expect(instant.safeParse(wrong).success, wrong).toBe(false)
  })

  it('a day is of the calendar and near', () => {
    expect(calendarDay().parse('2028-02-29')).toBe('2028-02-29')
    for (const wrong of ['2027-02-29', '0000-01-01', '9999-01-01', '2026-13-01'])
      expect(calendarDay().safeParse(wrong).success, wrong).toBe(false)
  })
})
