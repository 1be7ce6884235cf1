import { describe, expect, it } from 'vitest'
import { workloadLayout } from '@/components/charts/workload-geometry'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { holidaysText, type LabCalendar } from '@/lib/study/rules/working-days'
import {
  changeText,
  dueOfPlan,
  fullestChanged,
  fullestWeek,
  workloadOf,
  type DueJars,
} from '@/lib/study/rules/workload'

const calendar: LabCalendar = {
  timeZone: 'Europe/Berlin',
  workingDays: [1, 2, 3, 4, 5],
  holidays: [
    { day: '2027-03-26', name: 'Good Friday' },
    { day: '2027-03-27', name: 'Holy Saturday' },
    { day: '2027-03-29', name: 'Easter Monday' },
  ],
}
// A Wednesday; its Monday is 1 March.
const today = '2027-03-03'
const due = (day: string, jars: number, more: Partial<DueJars> = {}): DueJars => ({
  day,
  jars,
  kind: 'temperature',
  asks: 'measuring',
  ...more,
})

const batches = (count: number) => ({
  batchIds: Array.from({ length: count }, (_, index) => String(index)),
  referenceIds: [],
})

describe('jars by week', () => {
  const load = workloadOf(
    [
      due('2027-02-26', 3),
      due('2027-03-02', 2, { asks: 'watch' }),
      due('2027-03-03', 5),
      due('2027-03-07', 4, { asks: 'watch', kind: 'freeze-thaw' }),
      due('2027-03-08', 7),
      due('2027-08-29', 1),
      due('2027-08-30', 9),
    ],
    calendar,
    today,
  )

  it('from this Monday on, by what is done with them and at what kind of station; what is past is late', () => {
    expect(load.late).toBe(5)
    expect(load.weeks).toHaveLength(26)
    expect(load.weeks[0]).toEqual({
      monday: '2027-03-01',
      jars: 9,
      watch: 4,
      measuring: 5,
      byKind: { temperature: 5, 'freeze-thaw': 4, transport: 0 },
      holidays: [],
    })
    expect(load.weeks[1]).toMatchObject({ monday: '2027-03-08', jars: 7 })
    // The last of 26 weeks ends on 29 August; a jar of the 30th is not counted.
    expect(load.weeks[25]).toMatchObject({ monday: '2027-08-23', jars: 1 })
    expect(fullestWeek(load)).toMatchObject({ monday: '2027-03-01' })
    expect(fullestWeek(workloadOf([], calendar, today))).toBeNull()
  })

  it('with the holidays of each that fall on working days', () => {
    expect(load.weeks[3]!.holidays.map((one) => one.name)).toEqual(['Good Friday'])
    expect(load.weeks[4]!.holidays.map((one) => one.name)).toEqual(['Easter Monday'])
    expect(holidaysText(calendar.holidays)).toBe(
      'Good Friday (Fri 26 Mar), Holy Saturday (Sat 27 Mar), Easter Monday (Mon 29 Mar)',
    )
    const closing = ['2026-12-24', '2026-12-25', '2026-12-28'].map((day) => ({ day, name: 'closing' }))
    expect(holidaysText(closing)).toBe('closing (Thu 24 Dec to Mon 28 Dec)')
  })
})

describe('before and after a study', () => {
  it('counts what its plan will ask, on the days on which it is laid', () => {
    const plan = readyMadePlan('screen', 'cream')
    const own = dueOfPlan(plan, batches(2), '2027-02-27', calendar)
    // By hand: 4 stations with 9 time points and 1 with 5, a watch and a measuring jar each, two batches.
    expect(own.reduce((sum, one) => sum + one.jars, 0)).toBe((4 * 9 + 5) * 2 * 2)
    // Begun on a Saturday: week 1 is Saturday 6 March, its window of a day holds Friday.
    const first = own.filter((one) => one.day <= '2027-03-07')
    expect(new Set(first.map((one) => one.day))).toEqual(new Set(['2027-03-05']))
    const before = workloadOf([due('2027-03-10', 21)], calendar, today)
    const after = workloadOf([due('2027-03-10', 21), ...own], calendar, today)
    expect(fullestChanged(before, after)).toEqual({ monday: '2027-03-08', jars: 41, instead: 21 })
    expect(fullestChanged(before, before)).toBeNull()
  })

  it('counts a batch that takes turns only where it is measured', () => {
    const plan = { ...readyMadePlan('screen', 'cream'), batchMatrixing: 'half' as const }
    const all = dueOfPlan(plan, batches(2), today, calendar)
    // By hand: of 9 time points at 4 stations the first and the last measure both batches, the 7 between one of the
    // two; the 5 cycles both. Sealed jars are looked at every time: (4 × 9 + 5) × 2.
    const count = (asks: string) =>
      all.filter((one) => one.asks === asks).reduce((sum, one) => sum + one.jars, 0)
    expect(count('measuring')).toBe(4 * (2 * 2 + 7) + 5 * 2)
    expect(count('watch')).toBe((4 * 9 + 5) * 2)
    // A reference beside them is measured every time.
    const beside = dueOfPlan(plan, { ...batches(2), referenceIds: ['r'] }, today, calendar)
    expect(beside.length - all.length).toBe(2 * (4 * 9 + 5))
  })

  it('names the fullest week as a person says it', () => {
    expect(changeText({ monday: '2027-03-01', jars: 48, instead: 21 })).toBe(
      'week of 1 Mar: 48 jars instead of 21',
    )
    expect(changeText({ monday: '2027-03-01', jars: 1, instead: 0 })).toBe(
      'week of 1 Mar: one jar instead of none',
    )
  })
})

describe('the drawing', () => {
  it('stands every column on the shelf, and leaves a gap for each closed day', () => {
    const load = workloadOf([due('2027-03-03', 5), due('2027-03-10', 10)], calendar, today)
    const parts = load.weeks.map((week) => ({ low: week.measuring, high: week.watch }))
    const { columns, open, scale, shelf } = workloadLayout(load, parts, calendar, 1000, 44)
    expect(columns[1]!.low).toBeCloseTo(2 * columns[0]!.low)
    expect(columns.every(({ low, high }) => low + high < shelf)).toBe(true)
    // Each week's working days are one stretch; Good Friday shortens its week, Easter Monday the next.
    expect(open).toHaveLength(26)
    expect(open[0]!.to - open[0]!.from).toBeCloseTo((5 / 7) * (scale.x(1) - scale.x(0)))
    expect(open[3]!.to - open[3]!.from).toBeCloseTo((4 / 7) * (scale.x(1) - scale.x(0)))
    expect(open[4]!.from).toBeCloseTo(scale.x(4 + 1 / 7))
  })

  it('names only the first of the fullest weeks where there is no room', () => {
    const load = workloadOf([due('2027-03-03', 5), due('2027-03-10', 5)], calendar, today)
    const parts = load.weeks.map((week) => ({ low: week.measuring, high: 0 }))
    expect(workloadLayout(load, parts, calendar, 340, 44).columns.filter((one) => one.isNamed)).toHaveLength(
      1,
    )
    expect(workloadLayout(load, parts, calendar, 1000, 44).columns.filter((one) => one.isNamed)).toHaveLength(
      2,
    )
  })
})
