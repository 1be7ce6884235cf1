import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { driftTopic, instrumentDayTopic } from '@/lib/science/calc/drift'

type Drift = {
  band: { lower: number | null; upper: number | null }
  standing: string
  used: number | null
  slope: number | null
  slopeP: number | null
  leavesAt: number | null
  leavesAtLow: number | null
  leavesAtHigh: number | null
  rules: { rule: string; level: string; at: number }[]
}
type DriftInput = {
  times: number[]
  values: number[][]
  tolerance: { kind: string; below?: number; above?: number }
  endTime: number
  repeatabilitySd: number
}
const drift = (input: DriftInput) => driftTopic.run(input) as Drift

const steps = (min: number, max: number, step: number) =>
  fc.integer({ min: Math.round(min / step), max: Math.round(max / step) }).map((n) => n * step)

/** pH series over 26 weeks: a slope, noise, now and then a slip that only a repeat can settle. */
const series = fc
  .record({
    slope: steps(-0.05, 0.05, 0.001),
    noise: fc.array(fc.array(steps(-0.06, 0.06, 0.01), { minLength: 1, maxLength: 2 }), {
      minLength: 3,
      maxLength: 16,
    }),
    slip: fc.option(fc.tuple(fc.nat(15), steps(-2, 2, 0.1)), { freq: 3 }),
    sides: fc.constantFrom('both', 'below', 'above'),
  })
  .map(({ slope, noise, slip, sides }): DriftInput => {
    const times = noise.map((_, i) => i + (i % 3 === 2 ? 0.5 : 0))
    return {
      times,
      values: noise.map((replicates, i) =>
        replicates.map((n) => 5.5 + slope * times[i]! + n + (slip && slip[0] === i && i > 0 ? slip[1] : 0)),
      ),
      tolerance: {
        kind: 'shift',
        ...(sides === 'above' ? {} : { below: 0.5 }),
        ...(sides === 'below' ? {} : { above: 0.5 }),
      },
      endTime: 26,
      repeatabilitySd: 0.03,
    }
  })

const near = (actual: number | null, expected: number | null, digits = 8) =>
  expected === null ? expect(actual).toBeNull() : expect(actual).toBeCloseTo(expected, digits)

/** What the rules say, without their numbers. */
const said = ({ standing, rules }: Drift) => ({
  standing,
  rules: rules.map(({ rule, level, at }) => [rule, level, at]),
})

describe('drift', () => {
  it('does not depend on the order of the entries', () => {
    fc.assert(
      fc.property(
        series.chain((input) =>
          fc.tuple(
            fc.constant(input),
            fc.shuffledSubarray(
              input.times.map((_, i) => i),
              { minLength: input.times.length },
            ),
          ),
        ),
        ([input, order]) => {
          const turned = {
            ...input,
            times: order.map((i) => input.times[i]!),
            values: order.map((i) => input.values[i]!),
          }
          expect(drift(turned)).toEqual(drift(input))
        },
      ),
    )
  })

  it('is the same seen upside down', () => {
    fc.assert(
      fc.property(series, (input) => {
        const { below, above } = input.tolerance
        const turned = drift({
          ...input,
          values: input.values.map((replicates) => replicates.map((value) => 11 - value)),
          tolerance: {
            kind: 'shift',
            ...(above === undefined ? {} : { below: above }),
            ...(below === undefined ? {} : { above: below }),
          },
        })
        const plain = drift(input)
        expect(said(turned)).toEqual(said(plain))
        near(turned.slope, plain.slope === null ? null : -plain.slope)
        near(turned.used, plain.used)
        near(turned.leavesAtLow, plain.leavesAtLow, 5)
      }),
    )
  })

  it('knows no unit: values, tolerance and repeatability in thousandths say the same', () => {
    fc.assert(
      fc.property(series, (input) => {
        const { below, above } = input.tolerance
        const scaled = drift({
          ...input,
          values: input.values.map((replicates) => replicates.map((value) => value * 1024)),
          tolerance: {
            kind: 'shift',
            ...(below === undefined ? {} : { below: below * 1024 }),
            ...(above === undefined ? {} : { above: above * 1024 }),
          },
          repeatabilitySd: input.repeatabilitySd * 1024,
        })
        const plain = drift(input)
        expect(said(scaled)).toEqual(said(plain))
        near(scaled.used, plain.used)
        near(scaled.slopeP, plain.slopeP)
        near(scaled.leavesAt, plain.leavesAt, 6)
      }),
    )
  })

  it('leaves at the earliest, then by its line, then at the latest; a p is a one-sided one', () => {
    fc.assert(
      fc.property(series, (input) => {
        const { leavesAt, leavesAtLow, leavesAtHigh, slopeP, used } = drift(input)
        if (leavesAt !== null) expect(leavesAtLow!).toBeLessThanOrEqual(leavesAt + 1e-9)
        if (leavesAt !== null && leavesAtHigh !== null)
          expect(leavesAtHigh).toBeGreaterThanOrEqual(leavesAt - 1e-9)
        if (slopeP !== null) {
          expect(slopeP).toBeGreaterThanOrEqual(0)
          expect(slopeP).toBeLessThanOrEqual(0.5)
        }
        if (used !== null) expect(used).toBeGreaterThanOrEqual(0)
      }),
    )
  })

  it('is out only where a repeat says so too, and never by one reading alone', () => {
    fc.assert(
      fc.property(series, (input) => {
        expect(drift(input).standing).not.toBe('out')
        const last = input.values.length - 1
        const beyond = 5.5 + (input.tolerance.above === undefined ? -2 : 2)
        const once = { ...input, values: input.values.map((values, i) => (i === last ? [beyond] : values)) }
        expect(drift(once).standing).not.toBe('out')
        const twice = {
          ...once,
          times: [...once.times, once.times[last]!],
          values: [...once.values, [beyond]],
        }
        expect(drift(twice).standing).toBe('out')
      }),
    )
  })

  it('readings after a week change nothing that was found up to it', () => {
    fc.assert(
      fc.property(series, fc.integer({ min: 2, max: 16 }), (input, kept) => {
        const early = drift({
          ...input,
          times: input.times.slice(0, kept),
          values: input.values.slice(0, kept),
        })
        const doubtsOf = (finding: Drift) =>
          finding.rules.filter(({ level }) => level === 'doubt').map(({ rule, at }) => [rule, at])
        const until = input.times[Math.min(kept, input.times.length) - 1]!
        const later = doubtsOf(drift(input)).filter(([, at]) => (at as number) <= until)
        expect(later).toEqual(doubtsOf(early))
      }),
    )
  })
})

describe('instrument day', () => {
  const station = fc.record({
    temperatureC: fc.constantFrom(5, 25, 40, 45),
    values: fc.array(steps(5.3, 5.7, 0.01), { minLength: 2, maxLength: 9 }),
    today: steps(5.2, 5.8, 0.01),
  })
  const input = (stations: { temperatureC: number; values: number[]; today: number }[], sign = 1) => ({
    stations: stations.map(({ temperatureC, values, today }, i) => ({
      name: `station ${i}`,
      temperatureC: temperatureC + i / 100,
      times: [...values.map((_, j) => j), 20],
      values: [...values, today].map((value) => sign * value),
    })),
    at: 20,
    repeatabilitySd: 0.03,
  })
  type Day = { shift: boolean; direction: string | null; median: number | null }
  const run = (of: ReturnType<typeof input>) => instrumentDayTopic.run(of) as Day

  it('does not depend on the order of the stations, and low is high turned over', () => {
    fc.assert(
      fc.property(fc.array(station, { minLength: 1, maxLength: 6 }), (stations) => {
        const plain = run(input(stations))
        const ordered = input(stations)
        const turned = run({ ...ordered, stations: [...ordered.stations].reverse() })
        expect(turned.shift).toBe(plain.shift)
        near(turned.median, plain.median)
        const mirrored = run(input(stations, -1))
        // With residuals of both signs around a median of nothing, neither is turned into a shift.
        expect(mirrored.shift).toBe(plain.shift)
        near(mirrored.median, plain.median === null ? null : -plain.median)
        if (plain.shift) expect(mirrored.direction).toBe(plain.direction === 'high' ? 'low' : 'high')
      }),
    )
  })

  it('takes three stations at least, and a median of more than 2.25 of them', () => {
    fc.assert(
      fc.property(fc.array(station, { minLength: 1, maxLength: 6 }), (stations) => {
        const { shift, median } = run(input(stations))
        if (stations.length < 3) expect([shift, median]).toEqual([false, null])
        if (shift) expect(Math.abs(median!)).toBeGreaterThan(2.25)
      }),
    )
  })
})
