import { describe, expect, it } from 'vitest'
import { instrumentDay, type InstrumentDayStation } from '@/lib/science/instrument-day'

const s = 0.03
const noise = [0.3, -0.4, 0.1, -0.2, 0.4, -0.1, 0.2]

/** A station with seven earlier weeks of its own slope, and a reading of week 8 off its line by so many s. */
function station(temperatureC: number, off: number, slope = 0): InstrumentDayStation {
  const times = [1, 2, 3, 4, 5, 6, 7, 8]
  const values = times.map((t, i) => 5.5 + slope * t + s * (t === 8 ? off : noise[i]!))
  return { name: `${temperatureC} °C`, temperatureC, times, values }
}

const day = (stations: InstrumentDayStation[], more = {}) =>
  instrumentDay({ stations, at: 8, repeatabilitySd: s, ...more })

describe('a day on which one instrument read high or low everywhere', () => {
  it('is named where every station moved alike', () => {
    const high = day([station(5, 4), station(25, 4), station(40, 4, -0.01), station(45, 4, -0.03)])
    expect(high).toMatchObject({ shift: true, level: 'doubt', direction: 'high' })
    expect(high.median).toBeGreaterThan(3)
    expect(day([station(5, -4), station(25, -4), station(45, -4)])).toMatchObject({
      shift: true,
      direction: 'low',
    })
  })

  it('is not named on a steady day, nor where only the hot stations moved', () => {
    expect(day([station(5, 0.5), station(25, -0.5), station(40, 1)]).shift).toBe(false)
    expect(
      day([station(5, 0.2), station(25, 0.4), station(40, 4), station(45, 5), station(50, 6)]).shift,
    ).toBe(false)
  })

  it('needs three stations that have earlier readings', () => {
    const fresh = { name: 'new', temperatureC: 30, times: [8], values: [9] }
    expect(day([station(5, 4), station(25, 4), fresh])).toMatchObject({
      shift: false,
      median: null,
      direction: null,
    })
  })

  it('takes the mean of the latest two while a station is under six times', () => {
    const short = (temperatureC: number) => ({
      name: `${temperatureC}`,
      temperatureC,
      times: [1, 2, 3],
      values: [5, 5.4, 5.6],
    })
    const found = instrumentDay({ stations: [5, 25, 45].map(short), at: 3, repeatabilitySd: 0.1 })
    expect(found.evidence.residuals[0]!.residual).toBeCloseTo((5.6 - 5.2) / 0.1, 9)
  })

  it('is only a note within 14 days of making', () => {
    const stations = [station(5, 4), station(25, 4), station(45, 4)]
    expect(day(stations, { daysSinceMaking: 14 })).toMatchObject({ shift: true, level: 'note' })
    expect(day(stations, { daysSinceMaking: 15 })).toMatchObject({ shift: true, level: 'doubt' })
  })

  it('refuses an unknown repeatability', () => {
    expect(() => day([], { repeatabilitySd: 0 })).toThrow(/^repeatabilitySd: must be above 0/)
  })
})
