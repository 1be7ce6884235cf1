import { describe, expect, it } from 'vitest'
import { doubtOnEntry } from '@/lib/science/entry'
import { assessSeries } from '@/lib/science/drift'
import { plainContext, sentenceOf, type SentenceContext } from '@/lib/science/sentence'
import { phSeries, reading, repeat, separationSeries, weekly } from './series-of'

const ph = plainContext('45 °C', 'pH')
const separation = plainContext('45 °C', 'separation', '%', 1)
const viscosity: SentenceContext = { ...plainContext('45 °C', 'viscosity', 'mPa·s', 0), isRelative: true }

const said = (input: Parameters<typeof assessSeries>[0], context: SentenceContext) =>
  assessSeries(input).rules.map((rule) => sentenceOf(rule, context))

describe('what the rules say', () => {
  const steady = weekly(5.5, 5.49, 5.5)
  const beyond = reading(4, 4.9)

  it('of a reading beyond the band, before and after its repeat', () => {
    const viscous = phSeries(weekly(38000), {
      initial: [48200],
      tolerance: { kind: 'percent', below: 20, above: 20 },
      repeatabilitySd: 3860,
    })
    expect(said(viscous, viscosity)).toEqual([
      'Viscosity at 45 °C is 1.5 % below the band. Measure a second jar before anyone worries.',
    ])
    expect(said(phSeries([...steady, beyond]), ph)[0]).toBe(
      'pH at 45 °C is 0.10 below the band. Measure a second jar before anyone worries.',
    )
    expect(said(phSeries([...steady, beyond, repeat(beyond, 4.94)]), ph)).toEqual([
      'pH at 45 °C is out of its band: 4.92, allowed down to 5.00, confirmed by a repeat.',
    ])
    expect(said(phSeries([...steady, beyond, repeat(beyond, 5.48)]), ph)).toEqual([
      'pH at 45 °C read 4.90 and 5.48 in two jars, further apart than repeats explain. Measure a third; the median will count.',
    ])
  })

  it('of edge, lean and onset', () => {
    expect(said(phSeries(weekly(5.3, 5.2, 5.1), { repeatabilitySd: 0.1 }), ph)).toEqual([
      'pH at 45 °C has used 80 % of its band: 5.10.',
    ])
    expect(said(phSeries(weekly(5.45, 5.41, 5.34, 5.31, 5.24)), ph)[0]).toMatch(
      /^pH at 45 °C is leaning: its trend has used 5\d % of the band and leaves it about week \d+(\.\d)?, at the earliest week \d/,
    )
    expect(said(separationSeries(weekly(0, 0, 1.4, 2)), separation)).toEqual([
      'Separation has begun at 45 °C: 2.0 % in week 4, above the 1.0 % that can be told from none, in two pulls in a row.',
    ])
  })

  it('of jump, spread and torque', () => {
    expect(said(phSeries(weekly(5.5, 5.49, 5.51, 5.5, 5.7)), ph)).toEqual([
      'pH at 45 °C read 5.70, where the trend leads to 5.50. Measure again on a spare jar.',
    ])
    expect(said(phSeries(weekly([5.45, 5.56])), ph)).toEqual([
      'The replicates of pH at 45 °C lie 0.11 apart, more than repeats explain. Measure again.',
    ])
    const [torque] = doubtOnEntry(phSeries([]), { time: 1, values: [5.5], torquePercent: 6 })
    expect(sentenceOf(torque!, viscosity)).toBe(
      'Torque is 6.0 %, under 10 %: the reading is uncertain by 16.7 %. Check spindle and speed against the initial.',
    )
  })
})
