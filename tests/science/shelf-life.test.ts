import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { extrapolationCap } from '@/lib/science/extrapolation-cap'
import { boundAt } from '@/lib/science/meeting'
import { shelfLife, type ShelfLifeInput } from '@/lib/science/shelf-life'
import { expectDigits, reference } from './reference'

type Test = { F: number; df1: number; df2: number; p: number }
type QSet = {
  data: { batch: string; month: number; y: number }[]
  limits: { lower?: number; upper?: number }
  ancova: { slopes: Test; intercepts_given_common_slope_MSE_of_common_slope_model: Test }
  models: Record<string, { batch: string; slope: number; intercept: number; s: number; df: number }[]>
  shortest_crossing: Record<string, Record<string, number>>
}

const sets = reference<{ sets: Record<'A' | 'C' | 'E' | 'H', QSet> }>('ich-q1e').sets

function inputOf(set: QSet, direction: ShelfLifeInput['direction']): ShelfLifeInput {
  const names = [...new Set(set.data.map((row) => row.batch))]
  const batches = names.map((name) => {
    const rows = set.data.filter((row) => row.batch === name)
    return { name, t: rows.map((row) => row.month), y: rows.map((row) => row.y) }
  })
  return { batches, limit: set.limits, direction, horizon: 120 }
}

describe('shelf life by the method of ICH Q1E (2003) Appendix B, figures from R 4.2.2 and an independent closed form', () => {
  it('pools three batches of a falling attribute into a common line', () => {
    const found = shelfLife(inputOf(sets.A, 'decreasing'))
    expect(found.model).toBe('common line')
    const { slopes, intercepts_given_common_slope_MSE_of_common_slope_model: intercepts } = sets.A.ancova
    for (const [test, expected] of [
      [found.tests[0]!, slopes],
      [found.tests[1]!, intercepts],
    ] as const) {
      expectDigits(test.F, expected.F, 9)
      expectDigits(test.p, expected.p, 9)
      expect([test.df1, test.df2, test.pooled]).toEqual([expected.df1, expected.df2, true])
    }
    expectDigits(found.crossing, 22.8093452044939, 10)
    expectDigits(found.crossing, sets.A.shortest_crossing.pooled!.lower_limit_one_sided!, 10)
    expect(found.batches[0]!.side).toBe('lower')
    expect(found.limitingBatch).toBeNull()
  })

  it('keeps separate lines with a pooled error for unbalanced batches, two-sided against both limits', () => {
    const found = shelfLife(inputOf(sets.C, 'either'))
    expect(found.model).toBe('separate lines')
    expect(found.tests).toHaveLength(1)
    expectDigits(found.tests[0]!.F, sets.C.ancova.slopes.F, 9)
    expectDigits(found.crossing, sets.C.shortest_crossing.separate_pooled_mse!.two_sided_both!, 10)
    sets.C.models.separate_pooled_mse!.forEach((line, i) => {
      expectDigits(found.batches[i]!.slope, line.slope, 9)
      expectDigits(found.batches[i]!.intercept, line.intercept, 9)
      expectDigits(found.batches[i]!.residualSd, line.s, 9)
      expect(found.batches[i]!.df).toBe(line.df)
    })
    const least = Math.min(...found.batches.map((b) => b.crossing ?? Infinity))
    expect(found.batches.find((b) => b.name === found.limitingBatch)!.crossing).toBe(least)
  })

  it('crosses on both sides where a single batch does not move', () => {
    const crossings = sets.E.shortest_crossing.pooled!
    const either = shelfLife(inputOf(sets.E, 'either'))
    expect(either.model).toBe('common line')
    expect(either.tests).toEqual([])
    expect(either.limitingBatch).toBe('E1')
    expectDigits(either.crossing, crossings.two_sided_both!, 10)
    expectDigits(shelfLife(inputOf(sets.E, 'decreasing')).crossing, crossings.lower_limit_one_sided!, 10)
    expectDigits(shelfLife(inputOf(sets.E, 'increasing')).crossing, crossings.upper_limit_one_sided!, 10)
  })

  it('gives every other tabulated crossing: separate lines of equal batches, one line of unequal ones, one-sided too', () => {
    const crossing = (set: QSet, direction: ShelfLifeInput['direction'], poolingAlpha: number) =>
      shelfLife({ ...inputOf(set, direction), limit: { lower: set.limits.lower! }, poolingAlpha }).crossing
    for (const [set, model, alpha] of [
      [sets.A, 'separate_pooled_mse', 1],
      [sets.A, 'pooled', 0],
      [sets.C, 'separate_pooled_mse', 1],
      [sets.C, 'pooled', 0],
      [sets.E, 'pooled', 0.25],
    ] as const) {
      const expected = set.shortest_crossing[model]!
      expectDigits(crossing(set, 'decreasing', alpha), expected.lower_limit_one_sided!, 10)
      expectDigits(crossing(set, 'either', alpha), expected.lower_limit_two_sided!, 10)
    }
  })

  it('supports nothing where the bound is outside at time 0', () => {
    const found = shelfLife(inputOf(sets.H, 'decreasing'))
    expect(found.crossing).toBe(0)
    expect(found.batches[0]!.side).toBe('lower')
  })

  it('answers null where the bound stays inside up to the horizon', () => {
    const found = shelfLife({ ...inputOf(sets.A, 'decreasing'), horizon: 22 })
    expect(found.crossing).toBeNull()
    expect(found.limitingBatch).toBeNull()
    expect(found.batches.every((b) => b.crossing === null && b.side === null)).toBe(true)
  })

  it('has no F without residual variation: equal lines pool, others do not', () => {
    const t = [0, 1, 2, 3]
    const line = (a: number, b: number) => t.map((time) => a + b * time)
    const at = (y: number[]) =>
      shelfLife({
        batches: [
          { name: 'A', t, y: line(10, -1) },
          { name: 'B', t, y },
        ],
        limit: { lower: 0 },
        direction: 'decreasing',
        horizon: 60,
      })
    expect(at(line(10, -1))).toMatchObject({ model: 'common line', crossing: 10 })
    expect(at(line(10, -1)).tests[0]).toMatchObject({ F: null, p: null, pooled: true })
    expect(at(line(8, -1))).toMatchObject({ model: 'common slope', crossing: 8, limitingBatch: 'B' })
    expect(at(line(10, -2))).toMatchObject({ model: 'separate lines', crossing: 5, limitingBatch: 'B' })
  })

  it.each([
    [{ limit: {} }, /^limit: needs a lower limit/],
    [{ limit: { upper: 110 } }, /^limit: needs a lower limit/],
    [{ horizon: 0 }, /^horizon: must be above 0/],
    [{ batches: [] }, /^batches: needs at least one batch/],
    [{ batches: [{ name: 'A', t: [0, 1], y: [1, 2] }] }, /^batches\[0\]\.t: needs at least 3 values/],
    [{ batches: [{ name: 'A', t: [1, 1, 1], y: [1, 2, 3] }] }, /^batches\[0\]\.t: has no spread/],
  ])('refuses %j', (change, message) => {
    expect(() => shelfLife({ ...inputOf(sets.A, 'decreasing'), ...change })).toThrow(message)
  })
})

describe('shelf life as data change', () => {
  const batch = fc.record({
    t: fc.constant<number[]>([0, 3, 6, 9, 12, 18]),
    start: fc.integer({ min: 98, max: 102 }),
    slope: fc.integer({ min: -30, max: -5 }),
    noise: fc.array(fc.integer({ min: -30, max: 30 }), { minLength: 6, maxLength: 6 }),
  })
  const batches = fc.array(batch, { minLength: 1, maxLength: 4 }).map((list) =>
    list.map(({ t, start, slope, noise }, i) => ({
      name: `B${i}`,
      t,
      y: t.map((time, j) => start + (slope * time) / 100 + noise[j]! / 100),
    })),
  )

  it('does not depend on the order of batches or points', () => {
    fc.assert(
      fc.property(batches, (list) => {
        const input = { limit: { lower: 90 }, direction: 'decreasing' as const, horizon: 400 }
        const plain = shelfLife({ batches: list, ...input })
        const turned = shelfLife({
          batches: [...list].reverse().map((b) => ({ ...b, t: [...b.t].reverse(), y: [...b.y].reverse() })),
          ...input,
        })
        expect(turned.model).toBe(plain.model)
        if (plain.crossing === null) expect(turned.crossing).toBeNull()
        else expectDigits(turned.crossing, plain.crossing, 8)
      }),
    )
  })

  it('grows with a wider limit', () => {
    fc.assert(
      fc.property(batches, (list) => {
        const at = (lower: number) =>
          shelfLife({ batches: list, limit: { lower }, direction: 'decreasing', horizon: 1e6 }).crossing ??
          Infinity
        expect(at(90)).toBeGreaterThanOrEqual(at(92) - 1e-9)
      }),
    )
  })

  it('takes the least of two batches: a far better one changes neither side nor time by more than its error share', () => {
    const base = inputOf(sets.C, 'either')
    const steady = { name: 'far', t: [0, 6, 12, 24], y: [5.55, 5.56, 5.54, 5.55] }
    expect(shelfLife({ ...base, batches: [...base.batches, steady] }).limitingBatch).toBe(
      shelfLife(base).limitingBatch,
    )
  })
})

it('the bound itself is on the limit where it crosses', () => {
  const line = { centreX: 9, centre: 98, slope: -0.2, n: 6, sumSquaresX: 200, width: 0.9 }
  expect(boundAt(line, -1, 9)).toBeCloseTo(98 - 0.9 / Math.sqrt(6), 12)
})

describe('extrapolation caps of the decision tree of ICH Q1E (2003)', () => {
  const base = {
    dataMonths: 12,
    storage: 'room',
    acceleratedChange: false,
    variable: false,
    statistics: false,
  } as const
  it.each([
    [{}, 24],
    [{ variable: true, statistics: true }, 24],
    [{ variable: true }, 18],
    [{ dataMonths: 24 }, 36],
    [{ dataMonths: 24, variable: true }, 30],
    [{ acceleratedChange: true, intermediateChange: false, statistics: true }, 18],
    [{ acceleratedChange: true, intermediateChange: false }, 15],
    [{ acceleratedChange: true, intermediateChange: true, statistics: true }, 12],
    [{ acceleratedChange: true, statistics: true }, 12],
    [{ storage: 'refrigerated' as const }, 18],
    [{ storage: 'refrigerated' as const, dataMonths: 24 }, 30],
    [{ storage: 'refrigerated' as const, variable: true }, 15],
    [{ storage: 'refrigerated' as const, acceleratedChange: true }, 12],
    [{ storage: 'frozen' as const, dataMonths: 7.5 }, 7.5],
  ])('%j gives %d months', (change, months) => {
    expect(extrapolationCap({ ...base, ...change }).capMonths).toBe(months)
  })
})
