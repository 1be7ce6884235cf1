import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fUpperTail, tQuantile } from '@/lib/science/distributions'
import { leastSquares } from '@/lib/science/least-squares'
import { regression } from '@/lib/science/regression'
import { expectDigits, reference } from './reference'

type DataSet = {
  dataset: string
  x: number[] | number[][]
  y: number[]
  certified: { coefficients: number[]; sd_of_coefficients: number[]; residual_sd: number; r_squared: number }
}
type Nist = {
  datasets: DataSet[]
  norrisLimits: {
    points: {
      x: number
      fit: string
      ci95_two_sided: [string, string]
      pi95_two_sided?: [string, string]
      lower95_one_sided: string
      upper95_one_sided: string
    }[]
  }
}
type Quantiles = {
  t: Record<string, number>[]
  F: { p: number; df1: number; df2: number; F: number }[]
}

const nist = reference<Nist>('nist-linear')
const set = (name: string) => nist.datasets.find((d) => d.dataset === name)!

describe('regression against the certified values of NIST StRD', () => {
  const norris = set('Norris')
  const x = norris.x as number[]

  it('gives Norris to 9 digits', () => {
    const fit = regression({ x, y: norris.y })
    expectDigits(fit.intercept, norris.certified.coefficients[0]!, 9)
    expectDigits(fit.slope, norris.certified.coefficients[1]!, 9)
    expectDigits(fit.interceptSe, norris.certified.sd_of_coefficients[0]!, 9)
    expectDigits(fit.slopeSe, norris.certified.sd_of_coefficients[1]!, 9)
    expectDigits(fit.residualSd, norris.certified.residual_sd, 9)
    expectDigits(fit.r2, norris.certified.r_squared, 9)
  })

  it('gives the confidence limits of Norris as R 4.2.2 and 60-digit arithmetic do', () => {
    const points = nist.norrisLimits.points
    const { predictions } = regression({ x, y: norris.y, at: points.map((p) => p.x) })
    points.forEach((point, i) => {
      expectDigits(predictions[i]!.mean, Number(point.fit), 9)
      expectDigits(predictions[i]!.meanLow, Number(point.ci95_two_sided[0]), 9)
      expectDigits(predictions[i]!.meanHigh, Number(point.ci95_two_sided[1]), 9)
      if (point.pi95_two_sided) {
        expectDigits(predictions[i]!.newLow, Number(point.pi95_two_sided[0]), 9)
        expectDigits(predictions[i]!.newHigh, Number(point.pi95_two_sided[1]), 9)
      }
    })
  })

  it('gives the one-sided limits of Norris by two-sided ones at 90 %', () => {
    const points = nist.norrisLimits.points
    const { predictions } = regression({ x, y: norris.y, at: points.map((p) => p.x), confidence: 0.9 })
    points.forEach((point, i) => {
      expectDigits(predictions[i]!.meanLow, Number(point.lower95_one_sided), 9)
      expectDigits(predictions[i]!.meanHigh, Number(point.upper95_one_sided), 9)
    })
  })

  it('keeps 9 digits of the slope when x and y are shifted by 1e8', () => {
    // Integers a few thousand apart are exact at 1e8, so that only the arithmetic is tried.
    const far = x.map((value) => Math.round(value * 10))
    const y = norris.y.map((value) => Math.round(value * 10))
    const near = regression({ x: far, y })
    const shifted = regression({ x: far.map((v) => v + 1e8), y: y.map((v) => v + 1e8) })
    expectDigits(shifted.slope, near.slope, 9)
    expectDigits(shifted.residualSd, near.residualSd, 9)
    expectDigits(shifted.slopeSe, near.slopeSe, 9)
    expectDigits(shifted.r2, near.r2!, 9)
  })

  it('gives Pontius to 7 digits by general least squares', () => {
    const { y, certified, x: raw } = set('Pontius')
    const fit = leastSquares(
      (raw as number[]).map((v) => [1, v, v * v]),
      y,
    )
    certified.coefficients.forEach((c, i) => expectDigits(fit.coefficients[i], c, 7))
    certified.sd_of_coefficients.forEach((c, i) => expectDigits(fit.standardErrors[i], c, 7))
    expectDigits(fit.residualSd, certified.residual_sd, 7)
  })

  it('gives Longley to 7 digits by general least squares', () => {
    const { y, certified, x: raw } = set('Longley')
    const fit = leastSquares(
      (raw as number[][]).map((row) => [1, ...row]),
      y,
    )
    certified.coefficients.forEach((c, i) => expectDigits(fit.coefficients[i], c, 7))
    certified.sd_of_coefficients.forEach((c, i) => expectDigits(fit.standardErrors[i], c, 7))
    expectDigits(fit.residualSd, certified.residual_sd, 7)
  })
})

describe('distributions against R 4.2.2', () => {
  const table = reference<Quantiles>('outliers-quantiles')

  it('gives t quantiles to 10 digits', () => {
    for (const row of table.t) {
      for (const [key, value] of Object.entries(row)) {
        if (key.startsWith('p')) expectDigits(tQuantile(Number(key.slice(1)), row.df!), value, 10)
      }
    }
  })

  it('gives back the tail of tabulated F quantiles', () => {
    for (const { p, df1, df2, F } of table.F) expectDigits(fUpperTail(F, df1, df2), 1 - p, 9)
  })
})

describe('regression without residual variation or with too little data', () => {
  it('has no p where the points lie on the line, and no r2 where y is constant', () => {
    const exact = regression({ x: [1, 2, 3, 4], y: [0.1, 0.2, 0.3, 0.4] })
    expect(exact.slopeP).toBeNull()
    expect(exact.residualSd).toBe(0)
    expect(exact.r2).toBe(1)
    const flat = regression({ x: [1, 2, 3], y: [5, 5, 5] })
    expect(flat.r2).toBeNull()
    expect(flat.slope).toBe(0)
  })

  it.each([
    [{ x: [1, 2], y: [1, 2] }, /^x: needs at least 3 values, has 2/],
    [{ x: [1, 2, 3], y: [1, 2, 3, 4] }, /^y: has 4 values, but x has 3/],
    [{ x: [2, 2, 2], y: [1, 2, 3] }, /^x: has no spread/],
    [{ x: [1, 2, NaN], y: [1, 2, 3] }, /^x\[2\]: is not a finite number/],
    [{ x: [1, 2, 3], y: [1, 2, 3], confidence: 1 }, /^confidence: must lie between 0 and 1/],
  ])('refuses %j', (input, message) => expect(() => regression(input)).toThrow(message))
})

describe('regression in other units', () => {
  it('scales and shifts with its data', () => {
    const series = fc.array(fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: -500, max: 500 })), {
      minLength: 4,
      maxLength: 20,
    })
    fc.assert(
      fc.property(
        series,
        fc.constantFrom(0.25, 2, 1024),
        fc.integer({ min: -1000, max: 1000 }),
        (points, scale, shift) => {
          const x = points.map(([time]) => time)
          fc.pre(new Set(x).size > 2)
          const y = points.map(([, value]) => value)
          const fit = regression({ x, y, at: [70] })
          const other = regression({ x, y: y.map((v) => v * scale + shift), at: [70] })
          expect(other.slope).toBeCloseTo(fit.slope * scale, 6)
          expect(other.residualSd).toBeCloseTo(fit.residualSd * scale, 6)
          expect(other.predictions[0]!.newHigh).toBeCloseTo(fit.predictions[0]!.newHigh * scale + shift, 4)
        },
      ),
    )
  })
})
