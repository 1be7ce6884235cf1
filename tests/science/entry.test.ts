import { describe, expect, it } from 'vitest'
import { doubtOnEntry } from '@/lib/science/entry'
import { assessSeries } from '@/lib/science/drift'
import { phSeries, reading, weekly } from './series-of'

const steady = weekly(5.5, 5.49, 5.5, 5.51)

describe('what speaks against a value before it is saved', () => {
  it('R11: nothing where it fits', () => {
    expect(doubtOnEntry(phSeries(steady), { time: 5, values: [5.48] })).toEqual([])
  })

  it('R11: a tenfold slip is beyond the band and away from the trend', () => {
    const found = doubtOnEntry(phSeries(steady), { time: 5, values: [55] })
    expect(found.map((f) => f.rule)).toEqual(['out', 'jump'])
    expect(found.every((f) => f.level === 'doubt' && f.at === 5)).toBe(true)
  })

  it('finds what saving the value then finds', () => {
    for (const value of [4.9, 5.2, 5.36, 5.45, 5.6, 6.2]) {
      const entered = doubtOnEntry(phSeries(steady), { time: 5, values: [value] }).map((f) => f.rule)
      const saved = assessSeries(phSeries([...steady, reading(5, value)])).rules.filter(
        (r) => r.level === 'doubt',
      )
      expect(entered).toEqual(saved.map((r) => r.rule))
    }
  })

  it('judges against what came before its own day only', () => {
    const later = [...steady, reading(6, 5.2)]
    expect(doubtOnEntry(phSeries(later), { time: 5, values: [5.48] })).toEqual([])
  })

  it('does not ask for a repeat of a repeat, but looks at its replicates', () => {
    expect(doubtOnEntry(phSeries(steady), { time: 5, values: [4.9], isRepeat: true })).toEqual([])
    const spread = doubtOnEntry(phSeries(steady), { time: 5, values: [4.9, 5.1], isRepeat: true })
    expect(spread.map((f) => f.rule)).toEqual(['spread'])
  })

  it('doubts torque outside 10 to 100 %, or too low for the band', () => {
    const viscosity = phSeries([], {
      attribute: 'viscosity',
      initial: [48200],
      tolerance: { kind: 'percent', below: 20, above: 20 },
      repeatabilitySd: 3860,
    })
    const at = (torquePercent: number) => doubtOnEntry(viscosity, { time: 1, values: [48000], torquePercent })
    expect(at(6)).toMatchObject([{ rule: 'torque', level: 'doubt', evidence: { torquePercent: 6 } }])
    expect(at(12)[0]!.evidence.reason).toContain('a third of the band')
    expect(at(45)).toEqual([])
  })
})
