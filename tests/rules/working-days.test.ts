import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readHolidays } from '@/lib/holiday/rules'
import { overlap } from '@/lib/protocol/rules/faults'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { addDays, dayIn, nominalDay } from '@/lib/study/rules/calendar'
import { pullsOf, windowOf } from '@/lib/study/rules/pulls'
import { layOut, mondayOf, weekdayOf, whyClosed, type LabCalendar } from '@/lib/study/rules/working-days'

const monToFri: LabCalendar = { timeZone: 'Europe/Berlin', workingDays: [1, 2, 3, 4, 5], holidays: [] }
const closed = (...days: string[]): LabCalendar => ({
  ...monToFri,
  holidays: days.map((day) => ({ day, name: `holiday ${day}` })),
})
const pull = (nominalOn: string, windowDays = 2) => ({
  nominalOn,
  windowFrom: addDays(nominalOn, -windowDays),
  windowTo: addDays(nominalOn, windowDays),
})
const days = (pulls: { dueOn: string }[]) => pulls.map((one) => one.dueOn)

describe('the weekday', () => {
  it('is that of ISO 8601', () => {
    // 1 Jan 2026 is a Thursday, 28 Feb 2027 a Sunday [std: ISO 8601; Python's datetime.isoweekday].
    expect(weekdayOf('2026-01-01')).toBe(4)
    expect(weekdayOf('2027-02-28')).toBe(7)
    expect(mondayOf('2027-02-28')).toBe('2027-02-22')
    expect(mondayOf('2027-02-22')).toBe('2027-02-22')
  })
})

describe('a pull is laid on the nearest working day of its window', () => {
  it('a pull of each station has its window around the day its week means', () => {
    const station = { ...readyMadePlan('screen', 'lotion').stations[0]!, timePoints: [1, 2], windowDays: 2 }
    // Begun on a Saturday, so week 2 is one too.
    expect(pullsOf(station, '2026-09-05', 12, monToFri)[1]).toEqual({
      timeWeeks: 2,
      label: 'week 2',
      nominalOn: '2026-09-19',
      windowFrom: '2026-09-17',
      windowTo: '2026-09-21',
      dueOn: '2026-09-18',
      because: 'Saturday',
      isStuck: false,
    })
  })

  it('stays on its day where the lab works then', () => {
    expect(layOut([pull('2026-12-01')], monToFri)[0]).toMatchObject({ dueOn: '2026-12-01', because: null })
  })

  it('of two equally near days it takes the later', () => {
    expect(layOut([pull('2026-12-02')], closed('2026-12-02'))[0]).toMatchObject({
      dueOn: '2026-12-03',
      because: 'holiday 2026-12-02',
    })
  })

  it('keeps its day, and says so, where its window holds no working day', () => {
    const [laid] = layOut([pull('2026-12-26', 1)], closed('2026-12-25'))
    expect(laid).toMatchObject({ dueOn: '2026-12-26', because: 'Saturday', isStuck: true })
  })

  it('never lies before a day that is given', () => {
    const sunday = pull('2026-12-06', 2)
    expect(days(layOut([sunday], closed('2026-12-07')))).toEqual(['2026-12-08'])
    expect(days(layOut([sunday], closed('2026-12-07', '2026-12-08')))).toEqual(['2026-12-04'])
    const [laid] = layOut([sunday], closed('2026-12-07', '2026-12-08'), { notBefore: '2026-12-06' })
    expect(laid).toMatchObject({ dueOn: '2026-12-06', isStuck: true })
  })

  it('two pulls whose windows overlap do not collapse onto one day', () => {
    // Sunday and Monday of one station, as an old plan could have them: Monday's pull keeps its day.
    const laid = layOut([pull('2026-12-06', 3), pull('2026-12-07', 3)], monToFri)
    expect(days(laid)).toEqual(['2026-12-08', '2026-12-07'])
    const twice = layOut([pull('2026-12-05', 1), pull('2026-12-06', 1)], closed('2026-12-04'))
    expect(twice.map((one) => [one.dueOn, one.isStuck])).toEqual([
      ['2026-12-05', true],
      ['2026-12-07', false],
    ])
  })

  it('whatever the lab says, a day lies in its window, and no two of a station are the same', () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.integer({ min: 1, max: 60 }), { minLength: 1, maxLength: 12 }),
        fc.integer({ min: 0, max: 3 }),
        fc.uniqueArray(fc.integer({ min: 1, max: 7 }), { minLength: 1 }),
        fc.uniqueArray(fc.integer({ min: 0, max: 430 }), { maxLength: 60 }),
        (weeks, windowDays, workingDays, off) => {
          const timePoints = weeks.toSorted((a, b) => a - b)
          fc.pre(overlap({ timePoints, windowDays }, 'x') === null)
          const calendar = {
            timeZone: 'UTC',
            workingDays,
            holidays: off.map((at) => ({ day: addDays('2026-09-07', at), name: 'off' })),
          }
          const pulls = timePoints.map((week) => windowOf('2026-09-07', week, windowDays))
          const laid = layOut(pulls, calendar)
          expect(new Set(days(laid)).size).toBe(laid.length)
          for (const one of laid) {
            expect(one.dueOn >= one.windowFrom && one.dueOn <= one.windowTo).toBe(true)
            const open = Array.from({ length: 2 * windowDays + 1 }, (_, at) =>
              addDays(one.windowFrom, at),
            ).filter((day) => whyClosed(calendar, day) === null)
            expect(one.isStuck).toBe(open.length === 0)
            if (one.isStuck) expect(one.dueOn).toBe(one.nominalOn)
            else expect(open).toContain(one.dueOn)
          }
        },
      ),
      { numRuns: 300 },
    )
  })
})

describe('the lab’s own time zone, over changes of the clock [IANA tz]', () => {
  // Where clocks change: days of 23 and 25 hours, each with its first and its last minute in UTC.
  it.each([
    ['Europe/Berlin', '2026-03-29', '2026-03-28T23:00:00Z', '2026-03-29T21:59:59Z'],
    ['Europe/Berlin', '2026-10-25', '2026-10-24T22:00:00Z', '2026-10-25T22:59:59Z'],
    ['America/St_Johns', '2026-03-08', '2026-03-08T03:30:00Z', '2026-03-09T02:29:59Z'],
    ['America/St_Johns', '2026-11-01', '2026-11-01T02:30:00Z', '2026-11-02T03:29:59Z'],
    // East of UTC+12: Auckland in summer is UTC+13, Kiritimati UTC+14 all the year.
    ['Pacific/Auckland', '2026-09-27', '2026-09-26T12:00:00Z', '2026-09-27T10:59:59Z'],
    ['Pacific/Auckland', '2027-04-04', '2027-04-03T11:00:00Z', '2027-04-04T11:59:59Z'],
    ['Pacific/Kiritimati', '2026-12-01', '2026-11-30T10:00:00Z', '2026-12-01T09:59:59Z'],
  ])('in %s %s begins and ends when it does there', (zone, day, first, last) => {
    const just = (instant: string, ms: number) => new Date(Date.parse(instant) + ms).toISOString()
    expect(dayIn(zone, first)).toBe(day)
    expect(dayIn(zone, last)).toBe(day)
    expect(dayIn(zone, just(first, -1))).toBe(addDays(day, -1))
    expect(dayIn(zone, just(last, 1000))).toBe(addDays(day, 1))
    expect(whyClosed({ ...monToFri, timeZone: zone, workingDays: [1, 2, 3, 4, 5, 6, 7] }, day)).toBeNull()
  })

  it.each(['Europe/Berlin', 'America/St_Johns', 'Pacific/Auckland', 'Pacific/Kiritimati'])(
    'a time point keeps its weekday through both changes in %s',
    (zone) => {
      // A Wednesday, four weeks before Europe's clocks go forward; 52 weeks cross every change of a year.
      const started = dayIn(zone, '2026-03-04T12:00:00Z')
      for (let week = 1; week <= 52; week++) {
        const { nominalOn, windowFrom, windowTo } = windowOf(started, week, 2)
        expect(weekdayOf(nominalOn)).toBe(weekdayOf(started))
        expect((Date.parse(windowTo) - Date.parse(windowFrom)) / 86_400_000).toBe(4)
      }
    },
  )

  it('St John’s fell back one minute after midnight until 2011, so one evening came twice', () => {
    expect(dayIn('America/St_Johns', '2010-11-07T02:30:30Z')).toBe('2010-11-07')
    expect(dayIn('America/St_Johns', '2010-11-07T02:31:30Z')).toBe('2010-11-06')
    expect(dayIn('America/St_Johns', '2010-11-07T03:31:00Z')).toBe('2010-11-07')
  })

  it('Samoa had no 30 December 2011, so nothing is pulled on it', () => {
    const apia = { timeZone: 'Pacific/Apia', workingDays: [1, 2, 3, 4, 5, 6, 7], holidays: [] }
    expect(dayIn('Pacific/Apia', '2011-12-30T09:59:59Z')).toBe('2011-12-29')
    expect(dayIn('Pacific/Apia', '2011-12-30T10:00:00Z')).toBe('2011-12-31')
    expect(whyClosed(apia, '2011-12-29')).toBeNull()
    expect(whyClosed(apia, '2011-12-30')).toBe('a day that the lab’s time zone left out')
    expect(whyClosed(apia, '2011-12-31')).toBeNull()
    expect(whyClosed({ ...apia, timeZone: 'Europe/Berlin' }, '2011-12-30')).toBeNull()
    // Four weeks from 2 December end on the day that was not: the pull goes to the 31st.
    expect(nominalDay('2011-12-02', 4)).toBe('2011-12-30')
    expect(days(layOut([pull('2011-12-30', 1)], apia))).toEqual(['2011-12-31'])
  })
})

describe('a pasted block of holidays', () => {
  it('is read in the ways in which a lab writes days', () => {
    const { holidays, faults } = readHolidays(
      '2026-12-24\tChristmas Eve\n25.12.2026; Christmas Day\n\nSecond Christmas Day, 26 Dec 2026\n31/12/2026 Sylvester\n2027-01-01 to 2027-01-03 winter  break\n1. 5. 2027 - 2. 5. 2027 Labour Day\n',
    )
    expect(faults).toEqual([])
    expect(holidays).toEqual([
      { day: '2026-12-24', name: 'Christmas Eve' },
      { day: '2026-12-25', name: 'Christmas Day' },
      { day: '2026-12-26', name: 'Second Christmas Day' },
      { day: '2026-12-31', name: 'Sylvester' },
      { day: '2027-01-01', name: 'winter break' },
      { day: '2027-01-02', name: 'winter break' },
      { day: '2027-01-03', name: 'winter break' },
      { day: '2027-05-01', name: 'Labour Day' },
      { day: '2027-05-02', name: 'Labour Day' },
    ])
  })

  it('says the line that cannot be read, and reads the rest', () => {
    const { holidays, faults } = readHolidays(
      'closed for stocktaking\n30 Feb 2027 nothing\n3/4/2027 Easter\n2027-04-05\n2027-06-05 to 2027-06-01 away\n2027-10-03 Unity Day',
    )
    expect(holidays).toEqual([{ day: '2027-10-03', name: 'Unity Day' }])
    expect(faults.map((one) => one.slice(0, 7))).toEqual([
      'Line 1:',
      'Line 2:',
      'Line 3:',
      'Line 4:',
      'Line 5:',
    ])
    expect(faults[2]).toContain('two ways')
  })

  it('garbage and ten thousand lines do no harm', () => {
    fc.assert(fc.property(fc.string({ maxLength: 400 }), (text) => void readHolidays(text)))
    const block = Array.from({ length: 10_000 }, (_, at) => `${addDays('2026-01-01', at)} day ${at}`).join(
      '\n',
    )
    expect(readHolidays(block).faults[0]).toMatch(/Add at most 400/)
    expect(readHolidays('1999-12-31 to 9999-12-31 ever').holidays).toEqual([])
  })
})
