import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assessSeries } from '@/lib/science/drift'
import { isFiniteThroughout } from '@/lib/science/guard'
import { regression } from '@/lib/science/regression'
import type { RuleName, SeriesFinding } from '@/lib/science/series'
import { trendBand } from '@/lib/science/trend'
import { phSeries, reading, repeat, separationSeries, weekly } from './series-of'

const rulesOf = (finding: SeriesFinding, rule: RuleName) => finding.rules.filter((r) => r.rule === rule)
const lastPoint = (finding: SeriesFinding) => finding.points[finding.points.length - 1]!

describe('band and share of it', () => {
  it('makes the band from the tolerance and the mean of the initial', () => {
    const shift = assessSeries(phSeries([], { initial: [5.4, 5.6] }))
    expect(shift.band).toEqual({ lower: 5, upper: 6 })
    const percent = phSeries([], {
      initial: [48200],
      tolerance: { kind: 'percent', below: 20 },
      repeatabilitySd: 1900,
    })
    expect(assessSeries(percent).band).toEqual({ lower: 38560, upper: null })
    const range = phSeries([], { tolerance: { kind: 'range', lower: 5.2, upper: 5.8 } })
    expect(assessSeries(range).band).toEqual({ lower: 5.2, upper: 5.8 })
  })

  it('is 0 at the initial, 1 at the edge, 0 on an open side', () => {
    const uneven = { tolerance: { kind: 'range' as const, lower: 5.2, upper: 6.5 } }
    expect(assessSeries(phSeries(weekly(5.5), uneven)).used).toBe(0)
    expect(assessSeries(phSeries(weekly(5.35), uneven)).used).toBeCloseTo(0.5, 12)
    expect(assessSeries(phSeries(weekly(5.6), uneven)).used).toBeCloseTo(0.1, 12)
    expect(assessSeries(phSeries(weekly(5.6), { tolerance: { kind: 'shift', below: 0.5 } })).used).toBe(0)
  })

  it('stays computable when a corrected initial leaves its own band', () => {
    const finding = assessSeries(
      phSeries(weekly(5.5), { initial: [6.9], tolerance: { kind: 'range', lower: 5, upper: 6 } }),
    )
    expect(finding.used).toBeNull()
    expect(finding.standing).not.toBe('leaning')
  })
})

describe('standing', () => {
  it('is untold until two pulls count', () => {
    expect(assessSeries(phSeries([])).standing).toBe('untold')
    expect(assessSeries(phSeries([])).latest).toBeNull()
    expect(assessSeries(phSeries(weekly(5.5))).standing).toBe('untold')
    expect(assessSeries(phSeries(weekly(5.5, 5.49))).standing).toBe('steady')
  })

  it('is judged for every day from what was known then', () => {
    const finding = assessSeries(phSeries(weekly(5.45, 5.4, 5.35, 5.3, 5.25, 5.2)))
    expect(finding.points.map((p) => p.standing)).toEqual([
      'untold',
      'untold',
      'steady',
      'steady',
      'steady',
      'leaning',
      'leaning',
    ])
    expect(rulesOf(finding, 'lean')[0]!.at).toBe(5)
  })

  it('follows the order of time, whatever order readings come in, and a day that was missed is only missing', () => {
    const all = weekly(5.5, 5.48, 5.47, 5.44, 5.42)
    const gap = all.filter((r) => r.time !== 3)
    const finding = assessSeries(phSeries(gap))
    expect(finding.points.map((p) => p.time)).toEqual([0, 1, 2, 4, 5])
    expect(assessSeries(phSeries([...all].reverse()))).toEqual(assessSeries(phSeries(all)))
  })
})

describe('out', () => {
  const steady = weekly(5.5, 5.49, 5.5)
  const beyond = reading(4, 4.9)

  it('stays a doubt until a repeat: the standing does not change and the reading does not count', () => {
    const finding = assessSeries(phSeries([...steady, beyond]))
    expect(finding.standing).toBe('steady')
    expect(finding.latestTime).toBe(3)
    expect(lastPoint(finding)).toMatchObject({ counted: false, isBeyond: true })
    expect(lastPoint(finding).doubt).toContain('beyond the band, not confirmed')
    expect(rulesOf(finding, 'out')).toMatchObject([
      { level: 'doubt', at: 4, readingId: 'w4', evidence: { mean: 4.9, edge: 5, side: 'lower' } },
    ])
  })

  it('is confirmed by a repeat on a spare jar that agrees, and counts as the mean of the two', () => {
    const finding = assessSeries(phSeries([...steady, beyond, repeat(beyond, 4.94)]))
    expect(finding.standing).toBe('out')
    expect(finding.latest).toBeCloseTo(4.92, 12)
    expect(rulesOf(finding, 'out')).toMatchObject([
      { level: 'out', at: 4, evidence: { confirmedBy: 1, side: 'lower' } },
    ])
    expect(lastPoint(finding).countedIds).toEqual(['w4', 'w4 repeat'])
  })

  it('is not confirmed where the repeat is inside, even if the mean of the two is beyond', () => {
    const near = reading(4, 4.97)
    const finding = assessSeries(phSeries([...steady, near, repeat(near, 5.02)]))
    expect(finding.standing).toBe('steady')
    expect(finding.latest).toBeCloseTo(4.995, 12)
    expect(rulesOf(finding, 'edge')).toHaveLength(1)
  })

  it('asks for a third jar where two differ by more than 2.8 s, and then the median counts', () => {
    const back = repeat(beyond, 5.48)
    const undecided = assessSeries(phSeries([...steady, beyond, back]))
    expect(lastPoint(undecided)).toMatchObject({ counted: false, wantsThirdJar: true })
    expect(rulesOf(undecided, 'out')[0]!.evidence).toMatchObject({ repeat: 5.48, wants: 'a third jar' })
    expect(undecided.standing).toBe('steady')

    const inside = assessSeries(phSeries([...steady, beyond, back, repeat(beyond, 5.5, 'third')]))
    expect(inside).toMatchObject({ standing: 'steady', latest: 5.48 })
    const outside = assessSeries(phSeries([...steady, beyond, back, repeat(beyond, 4.92, 'third')]))
    expect(outside).toMatchObject({ standing: 'out', latest: 4.92 })
  })

  it('stands back once a later pull is inside, while the finding stays on record', () => {
    const confirmed = [...steady, beyond, repeat(beyond, 4.94)]
    const after = reading(5, 5.4, { doubts: [{ reason: 'jump', settled: true }] })
    const finding = assessSeries(phSeries([...confirmed, after]))
    expect(finding.standing).not.toBe('out')
    expect(rulesOf(finding, 'out')).toHaveLength(1)
  })

  it('leaves a reading out only where QA set it aside, and shows it still', () => {
    const finding = assessSeries(
      phSeries([...steady, { ...beyond, isSetAside: true }, { ...repeat(beyond, 4.94), isSetAside: true }]),
    )
    expect(finding.standing).toBe('steady')
    expect(lastPoint(finding)).toMatchObject({ counted: false, doubt: 'set aside with a laboratory cause' })
    expect(lastPoint(finding).readingIds).toHaveLength(2)
  })

  it('counts when a person set the doubt aside instead of repeating', () => {
    const settled = { ...beyond, doubts: ['out', 'jump'].map((reason) => ({ reason, settled: true })) }
    expect(assessSeries(phSeries([...steady, settled])).standing).toBe('out')
  })
})

describe('edge', () => {
  it('flags from 0.8 of the band without changing the standing, once for an unbroken run', () => {
    const finding = assessSeries(phSeries(weekly(5.3, 5.2, 5.1, 5.09), { repeatabilitySd: 0.1 }))
    expect(rulesOf(finding, 'edge')).toMatchObject([{ level: 'flag', at: 3, evidence: { time: 4, edge: 5 } }])
    expect(rulesOf(finding, 'edge')[0]!.evidence.used).toBeCloseTo(0.82, 10)
    const back = assessSeries(phSeries(weekly(5.3, 5.2, 5.1, 5.2), { repeatabilitySd: 0.1 }))
    expect(rulesOf(back, 'edge')).toHaveLength(0)
  })
})

describe('lean', () => {
  const falling = [5.45, 5.41, 5.34, 5.31, 5.24]
  const days = falling.map((_, i) => i + 1)

  it('needs five times, half of the band now and 0.8 at the end', () => {
    expect(assessSeries(phSeries(weekly(...falling.slice(0, 3)))).standing).toBe('steady')
    expect(assessSeries(phSeries(weekly(...falling))).standing).toBe('leaning')
    const slow = falling.map((v) => 5.5 + (v - 5.5) / 3)
    expect(assessSeries(phSeries(weekly(...slow))).standing).toBe('steady')
    const settles = { endTime: 5, tolerance: { kind: 'shift' as const, below: 0.45, above: 0.45 } }
    expect(assessSeries(phSeries(weekly(...falling), settles)).standing).toBe('steady')
  })

  it('never believes residuals smaller than the repeatability', () => {
    // Exactly on a line: only the floor s/√r stands against it.
    const line = [1, 2, 3, 4].map((t) => 5.5 - 0.065 * t)
    expect(assessSeries(phSeries(weekly(...line), { repeatabilitySd: 0.01 })).standing).toBe('leaning')
    expect(assessSeries(phSeries(weekly(...line), { repeatabilitySd: 0.2 })).standing).toBe('steady')
  })

  it('is one-sided at 0.1 for a limit on one side', () => {
    const upper = weekly(0.6, 0.7, 2.2, 2.4, 3.2)
    const finding = assessSeries(separationSeries(upper))
    const lean = rulesOf(finding, 'lean')[0]!
    expect(finding.standing).toBe('leaning')
    expect(lean.evidence).toMatchObject({ alpha: 0.1, comparedWith: null })
  })

  it('is compared with the coldest station: a drift both share at the same pace is not the heat', () => {
    const own = phSeries(weekly(...falling))
    const cold = (values: number[]) => ({ coldest: { times: days, values } })
    const still = assessSeries({ ...own, ...cold([5.5, 5.51, 5.49, 5.5, 5.5]) })
    expect(still.standing).toBe('leaning')
    expect(rulesOf(still, 'lean')[0]!.evidence.comparedWith).toBe('difference')

    const half = assessSeries({ ...own, ...cold(falling.map((v) => v + 0.15)) })
    expect(half.standing).toBe('steady')

    const same = assessSeries({ ...own, ...cold(falling) })
    expect(rulesOf(same, 'lean')[0]!.evidence.comparedWith).toBe('same trend at the coldest station')
  })

  it('needs four days in common with the coldest station', () => {
    const few = { times: days.slice(0, 3), values: [5.5, 5.5, 5.5] }
    expect(assessSeries(phSeries(weekly(...falling), { coldest: few })).standing).toBe('steady')
  })

  it('matches the coldest station by day where days are given', () => {
    const coldest = {
      times: days.map((d) => d + 0.3),
      values: days.map(() => 5.5),
      days: days.map((d) => `day ${d}`),
    }
    expect(assessSeries(phSeries(weekly(...falling), { coldest })).standing).toBe('leaning')
    expect(
      assessSeries(
        phSeries(weekly(...falling), { coldest: { times: coldest.times, values: coldest.values } }),
      ).standing,
    ).toBe('steady')
  })

  it('says when the trend leaves the band, with the limits of its 95 % confidence band', () => {
    const finding = assessSeries(phSeries(weekly(...falling), { repeatabilitySd: 0 }))
    const x = [0, ...days]
    const y = [5.5, ...falling]
    const line = regression({ x, y })
    expect(finding.leavesAt).toBeCloseTo((5 - line.intercept) / line.slope, 9)
    const at = (time: number) => regression({ x, y, at: [time] }).predictions[0]!
    expect(at(finding.leavesAtLow!).meanLow).toBeCloseTo(5, 9)
    expect(at(finding.leavesAtHigh!).meanHigh).toBeCloseTo(5, 9)
    const [drawn] = trendBand(finding, [10])
    expect(drawn!.low).toBeCloseTo(at(10).meanLow, 9)
    expect(drawn!.high).toBeCloseTo(at(10).meanHigh, 9)
  })
})

describe('onset of separation', () => {
  it('wants two pulls in a row or two jars of one day above the detection limit', () => {
    expect(rulesOf(assessSeries(separationSeries(weekly(0, 1.4, 0.5, 1.2))), 'onset')).toHaveLength(0)
    const row = assessSeries(separationSeries(weekly(0, 0, 1.4, 2)))
    expect(rulesOf(row, 'onset')).toMatchObject([
      { level: 'flag', at: 4, evidence: { since: 3, seenIn: 'two pulls in a row' } },
    ])
    expect(row.standing).toBe('steady')
    const twoJars = [...weekly(0, 0), reading(3, 1.4), reading(3, 1.6, { id: 'second', jar: 'second jar' })]
    const day = assessSeries(separationSeries(twoJars))
    expect(rulesOf(day, 'onset')).toMatchObject([{ at: 3, evidence: { seenIn: 'two jars', percent: 1.6 } }])
    expect(day.latest).toBe(1.6)
  })

  it('does not count readings in doubt', () => {
    const doubted = reading(4, 2, { doubts: [{ reason: 'sample not at temperature', settled: false }] })
    expect(rulesOf(assessSeries(separationSeries([...weekly(0, 0, 1.4), doubted])), 'onset')).toHaveLength(0)
  })
})

describe('jump and spread', () => {
  it('doubts a reading away from where four or more earlier times lead', () => {
    const finding = assessSeries(phSeries(weekly(5.5, 5.49, 5.51, 5.5, 5.7)))
    expect(rulesOf(finding, 'jump')).toMatchObject([
      { level: 'doubt', at: 5, evidence: { from: 'the trend' } },
    ])
    expect(lastPoint(finding).counted).toBe(false)
    expect(rulesOf(assessSeries(phSeries(weekly(5.5, 5.49, 5.51, 5.5, 5.58))), 'jump')).toHaveLength(0)
  })

  it('takes 7 s from the latest mean while there are fewer', () => {
    expect(rulesOf(assessSeries(phSeries(weekly(5.29))), 'jump')).toHaveLength(0)
    expect(rulesOf(assessSeries(phSeries(weekly(5.28))), 'jump')).toHaveLength(1)
  })

  it('believes a repeat that agrees, and doubts no other day for it', () => {
    const jump = reading(5, 5.7)
    const finding = assessSeries(phSeries([...weekly(5.5, 5.49, 5.51, 5.5), jump, repeat(jump, 5.71)]))
    expect(lastPoint(finding)).toMatchObject({ counted: true, doubt: null })
    expect(rulesOf(finding, 'jump')).toHaveLength(0)
  })

  it('doubts replicates further apart than 3.6 s', () => {
    expect(rulesOf(assessSeries(phSeries(weekly([5.45, 5.56]))), 'spread')).toHaveLength(1)
    expect(rulesOf(assessSeries(phSeries(weekly([5.45, 5.55]))), 'spread')).toHaveLength(0)
    expect(rulesOf(assessSeries(phSeries(weekly([5.45, 5.5, 5.56]))), 'spread')).toHaveLength(0)
  })
})

describe('doubts from outside', () => {
  const torque = { reason: 'torque 6.0 %', settled: false }
  it('keep a reading from counting until its repeat takes its place', () => {
    const doubted = reading(3, 5.2, { doubts: [torque] })
    const waiting = assessSeries(phSeries([...weekly(5.5, 5.49), doubted]))
    expect(lastPoint(waiting)).toMatchObject({ counted: false, doubt: 'torque 6.0 %' })
    const repeated = assessSeries(phSeries([...weekly(5.5, 5.49), doubted, repeat(doubted, 5.48)]))
    expect(repeated.latest).toBe(5.48)
    expect(lastPoint(repeated).countedIds).toEqual(['w3 repeat'])
    const settled = assessSeries(
      phSeries([
        ...weekly(5.5, 5.49),
        { ...doubted, values: [5.45], doubts: [{ ...torque, settled: true }] },
      ]),
    )
    expect(settled.latest).toBe(5.45)
  })

  it('given back by the application, the rules find their own again instead of believing them', () => {
    const echoed = reading(3, 5.49, { doubts: [{ reason: 'jump', settled: false }] })
    expect(lastPoint(assessSeries(phSeries([...weekly(5.5, 5.49), echoed]))).counted).toBe(true)
  })
})

describe('replicates, corrections and corrected initials', () => {
  it('averages replicates and jars of one day', () => {
    const pair = [reading(1, [5.48, 5.5]), reading(1, 5.52, { id: 'b', jar: 'b' })]
    const finding = assessSeries(phSeries(pair))
    expect(finding.latest).toBeCloseTo(5.5, 12)
    expect(finding.points[1]!.replicates).toBe(3)
  })

  it('moves the band with a corrected initial', () => {
    const readings = weekly(5.3, 5.2, 5.1)
    const wide = { repeatabilitySd: 0.1 }
    expect(rulesOf(assessSeries(phSeries(readings, wide)), 'edge')).toHaveLength(1)
    expect(rulesOf(assessSeries(phSeries(readings, { ...wide, initial: [5.2] })), 'edge')).toHaveLength(0)
  })

  it('lets a repeat stand for itself where the reading it repeats was voided', () => {
    const voided = reading(3, 9)
    const finding = assessSeries(phSeries([...weekly(5.5, 5.49), repeat(voided, 5.48)]))
    expect(lastPoint(finding)).toMatchObject({ counted: true, mean: 5.48 })
  })
})

describe('whatever it is given', () => {
  const anyValue = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e9, max: 1e9 })
  const anyReadings = fc.array(fc.tuple(fc.nat(104), fc.array(anyValue, { minLength: 1, maxLength: 3 })), {
    maxLength: 20,
  })

  it('answers without NaN or Infinity', () => {
    fc.assert(
      fc.property(anyReadings, anyValue, fc.double({ min: 0, max: 100, noNaN: true }), (rows, initial, s) => {
        const readings = rows.map(([time, values], i) => reading(time, values, { id: `r${i}`, jar: `j${i}` }))
        const finding = assessSeries(
          phSeries(readings, {
            initial: [initial],
            repeatabilitySd: s,
            tolerance: { kind: 'shift', below: 1, above: 2 },
          }),
        )
        expect(isFiniteThroughout(finding)).toBe(true)
      }),
    )
  })

  it('keeps its standing when units change', () => {
    const moves = fc.array(fc.integer({ min: -60, max: 40 }), { minLength: 5, maxLength: 12 })
    fc.assert(
      fc.property(moves, (steps) => {
        let level = 5.5
        const values = steps.map((step) => (level += step / 1000))
        const plain = assessSeries(phSeries(weekly(...values)))
        const scaled = assessSeries(
          phSeries(weekly(...values.map((v) => v * 1024)), {
            initial: [5.5 * 1024],
            repeatabilitySd: 0.03 * 1024,
            tolerance: { kind: 'shift', below: 512, above: 512 },
          }),
        )
        expect(scaled.standing).toBe(plain.standing)
        expect(scaled.points.map((p) => p.counted)).toEqual(plain.points.map((p) => p.counted))
      }),
    )
  })
})
