import { describe, expect, it } from 'vitest'
import { ScienceError } from '@/lib/science/guard'
import { shelfLife } from '@/lib/science/shelf-life'
import { shelfLifeLines } from '@/lib/science/shelf-life-lines'
import {
  fromScale,
  limitsOnScale,
  onScale,
  shelfLifeScale,
  slopeFromScale,
} from '@/lib/science/shelf-life-scale'

describe('the scale of a regression', () => {
  it('is a share of the initial for a tolerance in percent, whatever the attribute', () => {
    expect(shelfLifeScale({ kind: 'percent', below: 20 }, false)).toBe('log share')
    expect(shelfLifeScale({ kind: 'shift', below: 0.3 }, true)).toBe('difference')
    expect(shelfLifeScale({ kind: 'range', lower: 5000 }, true)).toBe('log reading')
    expect(shelfLifeScale({ kind: 'range', upper: 2 }, false)).toBe('reading')
  })

  it('goes there and back', () => {
    // 80 of 100 is 80 %, ln 0.8; e to the zero is all of it.
    expect(onScale('log share', 80, 100)).toBeCloseTo(-0.22314355131420976, 15)
    expect(fromScale('log share', onScale('log share', 80, 100))).toBeCloseTo(80, 12)
    expect(fromScale('log reading', onScale('log reading', 6200, 1))).toBeCloseTo(6200, 9)
    expect(onScale('difference', 5.4, 5.6)).toBeCloseTo(-0.2, 12)
    expect(() => onScale('log share', 0, 100)).toThrow(ScienceError)
  })

  it('tells a slope on logarithms as percent a month: ln 1.01 is one percent more', () => {
    expect(slopeFromScale('log share', 0.00995033085316808)).toBeCloseTo(1, 12)
    expect(slopeFromScale('reading', -0.02)).toBe(-0.02)
  })

  it('carries the tolerance over; a fall of all there is limits nothing', () => {
    const { lower, upper } = limitsOnScale('log share', { kind: 'percent', below: 20, above: 25 })
    expect([Math.exp(lower!), Math.exp(upper!)].map((x) => Number(x.toFixed(12)))).toEqual([0.8, 1.25])
    expect(limitsOnScale('log share', { kind: 'percent', below: 100, above: 25 }).lower).toBeUndefined()
    expect(limitsOnScale('log share', { kind: 'percent', below: 150, above: 25 }).lower).toBeUndefined()
    expect(limitsOnScale('difference', { kind: 'shift', below: 0.3 })).toEqual({ lower: -0.3 })
    expect(limitsOnScale('reading', { kind: 'range', lower: 5, upper: 6 })).toEqual({ lower: 5, upper: 6 })
  })
})

describe('lines drawn for a shelf life', () => {
  const batches = [
    { name: 'A', t: [0, 3, 6, 9, 12, 18], y: [100, 99.1, 98.6, 97.4, 96.9, 94.8] },
    { name: 'B', t: [0, 3, 6, 9, 12, 18], y: [100.4, 99.6, 98.2, 97.8, 96.1, 94.9] },
  ]
  it.each(['decreasing', 'either'] as const)('meet the limit where it says (%s)', (direction) => {
    const input = { batches, limit: { lower: 90 }, direction, horizon: 60 }
    const { crossing, batches: fits } = shelfLife(input)
    const [line] = shelfLifeLines(input, [0, crossing!])
    expect(line!.lower[1]).toBeCloseTo(90, 9)
    expect(line!.mean[0]).toBeCloseTo(fits[0]!.intercept, 12)
    expect(line!.upper[1]! - line!.mean[1]!).toBeCloseTo(line!.mean[1]! - line!.lower[1]!, 12)
  })
})
