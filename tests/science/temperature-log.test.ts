import { describe, expect, it } from 'vitest'
import { ScienceError } from '@/lib/science/guard'
import { excursionSpans, hoursOfEntries } from '@/lib/science/temperature-log'

describe('hours that the entries of a log stand for', () => {
  it('are half the gap on either side, so that they add up to the log', () => {
    expect(hoursOfEntries([0, 24, 48, 96])).toEqual([12, 24, 36, 24])
  })

  it('are none where the log spans no time', () => {
    expect(hoursOfEntries([])).toBeUndefined()
    expect(hoursOfEntries([5])).toBeUndefined()
    expect(hoursOfEntries([5, 5])).toBeUndefined()
  })

  it('refuse a log that is not in order', () => {
    expect(() => hoursOfEntries([0, 24, 12])).toThrow(ScienceError)
  })
})

describe('excursions of a log', () => {
  const limits = { lowC: 23, highC: 27 }
  const of = (temperatures: number[], more = limits) =>
    excursionSpans(
      temperatures.map((_, i) => i * 24),
      temperatures,
      more,
    )

  it('begin with the first entry outside and end with the first inside', () => {
    expect(of([25, 28, 30, 29, 25])).toEqual([{ from: 1, to: 4, side: 'above', extremeC: 30, hours: 72 }])
  })

  it('are two where it goes from one side to the other', () => {
    expect(of([25, 28, 20, 25])).toEqual([
      { from: 1, to: 2, side: 'above', extremeC: 28, hours: 24 },
      { from: 2, to: 3, side: 'below', extremeC: 20, hours: 24 },
    ])
  })

  it('end with the log where it ends outside, and are none on the limit or where a side is open', () => {
    expect(of([25, 28, 31])).toEqual([{ from: 1, to: 2, side: 'above', extremeC: 31, hours: 24 }])
    expect(of([27, 23])).toEqual([])
    expect(excursionSpans([0], [40], { lowC: 23, highC: null })).toEqual([])
  })
})
