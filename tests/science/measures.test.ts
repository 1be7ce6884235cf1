import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { acceleratedAge } from '@/lib/science/accelerated-age'
import { arrhenius } from '@/lib/science/arrhenius'
import { bufferPh, type Buffer } from '@/lib/science/buffer-ph'
import { centrifuge } from '@/lib/science/centrifuge'
import { colour } from '@/lib/science/colour'
import { droplets } from '@/lib/science/droplets'
import { jarPlan } from '@/lib/science/jar-plan'
import { zeroCelsius } from '@/lib/science/kelvin'
import { mkt } from '@/lib/science/mkt'
import { outlier, grubbsCritical } from '@/lib/science/outlier'
import { closestPacking, phaseFraction } from '@/lib/science/phase-fraction'
import { phSlope, theoreticalSlope } from '@/lib/science/ph-slope'
import { separation, separationDetectionLimit } from '@/lib/science/separation'
import { separationCurve } from '@/lib/science/separation-curve'
import { settling } from '@/lib/science/settling'
import { viscosity } from '@/lib/science/viscosity'
import { expectDigits, reference } from './reference'

type Emulsion = {
  closestPacking: { value: number }
  stokes: { example: Record<string, number> }
  rcf: { example: Record<string, number> }
  droplets: { example: { classes: { d_um: number; count: number }[] } & Record<string, unknown> }
}
const emulsion = reference<Emulsion>('emulsion')

describe('heat', () => {
  it('mean kinetic temperature: Haynes 1971 with USP <1160> constants', () => {
    const { series } = reference<{
      series: ({ temps: number[]; arith: number } & Record<`mkt_${string}`, number>)[]
    }>('mean-kinetic-temperature')
    for (const { temps, arith, ...expected } of series) {
      const found = mkt({ temperaturesC: temps })
      expectDigits(found.mktC, expected['mkt_R_8.314462618']!, 12)
      expectDigits(found.meanC, arith, 12)
      for (const deltaHkJ of [42, 125, 250]) {
        expectDigits(mkt({ temperaturesC: temps, deltaHkJ }).mktC, expected[`mkt_dH_${deltaHkJ}kJ`]!, 12)
      }
      // ΔH/R of 10,000 K exactly, as USP prints it.
      expectDigits(mkt({ temperaturesC: temps, deltaHkJ: 83.14462618 }).mktC, expected.mkt_dHR_10000!, 12)
    }
  })

  it('mean kinetic temperature lies between mean and maximum and weighs hours as repeats', () => {
    const temperatures = fc.array(fc.double({ min: -40, max: 80, noNaN: true }), {
      minLength: 1,
      maxLength: 30,
    })
    fc.assert(
      fc.property(temperatures, (temperaturesC) => {
        const { mktC, meanC, maxC, minC } = mkt({ temperaturesC })
        expect(mktC).toBeGreaterThanOrEqual(meanC)
        expect(mktC).toBeLessThanOrEqual(maxC)
        expect(meanC).toBeGreaterThanOrEqual(minC)
      }),
    )
    expect(mkt({ temperaturesC: [20, 30], hoursEach: [2, 1] }).mktC).toBeCloseTo(
      mkt({ temperaturesC: [20, 20, 30] }).mktC,
      10,
    )
    expect(() => mkt({ temperaturesC: [-300] })).toThrow(
      /^temperaturesC\[0\]: -300 °C is not above absolute zero/,
    )
    expect(() => mkt({ temperaturesC: [20], hoursEach: [0] })).toThrow(/^hoursEach: add up to no time/)
  })

  it('Arrhenius: hydrogen iodide of OpenStax Chemistry 2e 12.5, least squares by R', () => {
    const { hydrogenIodideExample: example } = reference<{
      hydrogenIodideExample: { T_K: number[]; k: number[]; least_squares: Record<string, number> }
    }>('arrhenius')
    const fit = arrhenius({
      temperaturesC: example.T_K.map((t) => t - zeroCelsius),
      rates: example.k,
      predictC: [650 - zeroCelsius],
    })
    expectDigits(fit.eaKJ, example.least_squares.Ea_kJ!, 9)
    expectDigits(fit.eaSe, example.least_squares.Ea_se_kJ!, 9)
    expectDigits(fit.lnA, example.least_squares.lnA!, 9)
    expectDigits(fit.r2, example.least_squares.r2!, 9)
    const [predicted] = fit.predictions
    expect(predicted!.low).toBeLessThan(predicted!.rate)
    expect(predicted!.high).toBeGreaterThan(predicted!.rate)
    expect(fit.curvature.p).not.toBeNull()
    expect(arrhenius({ temperaturesC: [25, 37, 45], rates: [1, 3, 6] }).curvature.doubt).toContain(
      'not tested',
    )
  })

  it('doubling for every 10 °C: 4 from 25 to 45, 128 to 95 (OpenStax Chemistry 2e)', () => {
    const at = (acceleratedC: number) =>
      acceleratedAge({ storageC: 25, acceleratedC, q10: 2, targetMonths: 24 })
    expect(at(45)).toEqual({ factor: 4, acceleratedMonths: 6 })
    expect(at(95).factor).toBe(128)
  })
})

describe('pH', () => {
  const tables = reference<
    Record<Buffer, { ph: number[] }> & {
      temperaturesC: number[]
      nernstMvPerPh: { T_C: number; mV_per_pH: string }[]
    }
  >('ph')

  it('buffers as tabulated (NBS: Bates 1962, Durst SP 260-53; IUPAC 2002), linear between', () => {
    for (const buffer of ['phthalate', 'phosphate', 'borax'] as const) {
      tables.temperaturesC.forEach((temperatureC, i) =>
        expect(bufferPh({ buffer, temperatureC }).ph).toBe(tables[buffer].ph[i]),
      )
    }
    expect(bufferPh({ buffer: 'borax', temperatureC: 22.5 }).ph).toBeCloseTo((9.225 + 9.18) / 2, 12)
    expect(() => bufferPh({ buffer: 'borax', temperatureC: 61 })).toThrow(
      /^temperatureC: must lie from 0 to 60/,
    )
  })

  it('theoretical slope 2.302585·R·T/F with CODATA 2018 constants', () => {
    for (const { T_C, mV_per_pH } of tables.nernstMvPerPh)
      expectDigits(theoreticalSlope(T_C), Number(mV_per_pH), 9)
  })

  it('an ideal electrode has 100 % and no doubt; a tired one says so; a reversed one too', () => {
    const points = (share: number) =>
      [4, 7, 10].map((bufferPh) => ({ bufferPh, mV: -59.1593497 * share * (bufferPh - 7) + 3 }))
    const ideal = phSlope({ points: points(1), temperatureC: 25 })
    expect(ideal.efficiencyPercent).toBeCloseTo(100, 6)
    expect(ideal.offsetMv).toBeCloseTo(3, 9)
    expect(ideal.doubt).toBeNull()
    expect(phSlope({ points: points(0.93), temperatureC: 25 }).doubt).toContain('93.0 %')
    expect(phSlope({ points: points(0.9496), temperatureC: 25 }).doubt).toContain('94.96 %')
    expect(phSlope({ points: points(1.0500004), temperatureC: 25 }).doubt).toContain('105.00004 %')
    expect(phSlope({ points: points(-1), temperatureC: 25 }).doubt).toContain('wrong sign')
    expect(() => phSlope({ points: points(1).slice(0, 1), temperatureC: 25 })).toThrow(
      /^points: needs at least 2/,
    )
  })
})

describe('emulsion', () => {
  it('closest packing of equal spheres is π/√18 (Cameron & Sherrington 2005)', () => {
    expectDigits(closestPacking, emulsion.closestPacking.value, 14)
  })

  it('internal phase by volume (arithmetic, no source)', () => {
    const line = (percent: number, density: number, internal: boolean) => ({ percent, density, internal })
    const found = phaseFraction({ lines: [line(80, 1, true), line(20, 0.8, false)] })
    // 80 mL in 80 + 25 mL.
    expect(found.internalVolumePercent).toBeCloseTo((100 * 80) / 105, 12)
    expect(found).toMatchObject({ totalPercent: 100, internalMassPercent: 80, highInternalPhase: true })
    expect(phaseFraction({ lines: [line(74, 1, true), line(26, 1, false)] }).highInternalPhase).toBe(false)
    expect(
      phaseFraction({ lines: [line(0.1, 1, true), line(0.2, 1, false), line(99.7, 1, false)] }).totalPercent,
    ).toBe(100)
    expect(() => phaseFraction({ lines: [line(10, 0, true)] })).toThrow(
      /^lines\[0\]\.density: must be above 0/,
    )
  })

  it('Stokes: 17 mm a day of McClements, Food Emulsions', () => {
    const e = emulsion.stokes.example
    const found = settling({
      diameterUm: e.d_um!,
      densityDifference: e.rho_continuous! - e.rho_dispersed!,
      viscosityMPas: e.eta_Pas! * 1000,
      g: e.g!,
    })
    expectDigits(found.velocityMmPerDay, e.mm_per_day!, 12)
  })

  it('relative centrifugal force: 5 cm at 10 000 rpm is about 5,590', () => {
    expectDigits(centrifuge({ rpm: 10000, radiusMm: 50 }).rcf, emulsion.rcf.example.rcf_1p118e_5!, 12)
  })

  it('droplet moments in the notation of ISO 9276-2', () => {
    const { classes, ...moments } = emulsion.droplets.example
    const found = droplets({ diametersUm: classes.map((c) => c.d_um), counts: classes.map((c) => c.count) })
    expectDigits(found.d10, moments.D10 as number, 12)
    expectDigits(found.d32, moments.D32 as number, 12)
    expectDigits(found.d43, moments.D43 as number, 12)
    expect(droplets({ diametersUm: [4, 4] })).toEqual({ d10: 4, d32: 4, d43: 4, d50v: 4, span: 0 })
  })

  it('jars and grams of a study (arithmetic, no source)', () => {
    const station = {
      name: '45 °C',
      timePoints: [1, 2, 4, 8],
      watchJars: 2,
      measuringJarsPerPull: 1,
      spares: 2,
    }
    const input = {
      stations: [station, station],
      initialJars: 2,
      retains: 2,
      fillG: 50,
      lossPercent: 20,
      batchG: 1250,
    }
    expect(jarPlan(input)).toEqual({
      jars: 20,
      watchJars: 4,
      measuringJars: 8,
      spares: 4,
      grams: 1250,
      fits: true,
      shortG: 0,
    })
    expect(jarPlan({ ...input, batchG: 1000 })).toMatchObject({ fits: false, shortG: 250 })
    expect(() => jarPlan({ ...input, lossPercent: 100 })).toThrow(/^lossPercent/)
    expect(() => jarPlan({ ...input, retains: 1.5 })).toThrow(/^retains: must be a whole number/)
  })
})

describe('colour', () => {
  type Pair = { pair: number; lab1: number[]; lab2: number[]; dE00_published: number; dE76_computed: string }
  const { pairs } = reference<{ pairs: Pair[] }>('ciede2000')
  const lab = ([L = 0, a = 0, b = 0]: number[]) => ({ L, a, b })

  it.each(pairs.map((pair) => [pair.pair, pair] as const))(
    'pair %d of Sharma, Wu & Dalal 2005',
    (_, pair) => {
      const forth = colour({ reference: lab(pair.lab1), sample: lab(pair.lab2) })
      const back = colour({ reference: lab(pair.lab2), sample: lab(pair.lab1) })
      expect(Math.abs(forth.deltaE00 - pair.dE00_published)).toBeLessThanOrEqual(1e-4)
      expect(back.deltaE00).toBeCloseTo(forth.deltaE00, 10)
      expectDigits(forth.deltaE76, Number(pair.dE76_computed), 10)
      expect(colour({ reference: lab(pair.lab1), sample: lab(pair.lab1) })).toEqual({
        deltaE00: 0,
        deltaE76: 0,
      })
    },
  )
})

describe('viscosity and separation', () => {
  it('computes from torque and spindle, and doubts torque outside 10 to 100 % (arithmetic, no source)', () => {
    expect(viscosity({ torquePercent: 62, factor: 1000 })).toEqual({
      mPas: 62000,
      fullScalemPas: 100000,
      errorPercent: 100 / 62,
      doubt: null,
    })
    expect(viscosity({ torquePercent: 62, spindleConstant: 10000, rpm: 10 }).mPas).toBe(62000)
    expect(viscosity({ torquePercent: 6, factor: 1000 }).doubt).toContain('under 10 %')
    expect(viscosity({ torquePercent: 9.96, factor: 1000 }).doubt).toMatch(/^Torque is 9\.96 %, under 10 %/)
    expect(viscosity({ torquePercent: 100.04, factor: 1000 }).doubt).toContain('is 100.04 %')
    expect(viscosity({ torquePercent: 101, factor: 1000 }).doubt).toContain('beyond the end of the scale')
    expect(viscosity({ torquePercent: 12, factor: 1000, bandPercent: 20 }).doubt).toContain(
      'a third of the band',
    )
    expect(viscosity({ torquePercent: 30, factor: 1000, bandPercent: 20 }).doubt).toBeNull()
    expect(() => viscosity({ torquePercent: 10, spindleConstant: 1, rpm: 0 })).toThrow(
      /^rpm: must be above 0/,
    )
  })

  it('adds layers to the separation', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 900 }), fc.nat(900), fc.nat(900), (total, top, bottom) => {
        fc.pre(top + bottom <= total)
        const found = separation({ totalMm: total / 10, topMm: top / 10, bottomMm: bottom / 10 })
        expect(found.percent).toBeCloseTo(found.topPercent + found.bottomPercent, 9)
        expect(found.percent).toBeLessThanOrEqual(100)
      }),
    )
    expect(() => separation({ totalMm: 40, topMm: 30, bottomMm: 11 })).toThrow(
      /together are higher than the fill/,
    )
    expect(separationDetectionLimit(45)).toBeCloseTo(100 / 45, 12)
    expect(separationDetectionLimit(200)).toBe(1)
  })

  it('finds onset, rate and plateau of a separation curve', () => {
    const t = [0, 1, 2, 3, 4, 5, 6, 8, 10, 12, 16, 20, 26]
    const lagged = separationCurve({
      t,
      percent: t.map((x) => (x > 3 ? 18 * (1 - Math.exp(-0.25 * (x - 3))) : 0)),
    })
    expect(lagged.model).toBe('first order after a lag')
    expect(lagged.plateau).toBeCloseTo(18, 5)
    expect(lagged.rate).toBeCloseTo(4.5, 5)
    const line = separationCurve({ t, percent: t.map((x) => Math.max(0, 1.2 * (x - 4))) })
    expect(line).toMatchObject({ model: 'linear', plateau: null })
    expect(line.rate).toBeCloseTo(1.2, 10)
    expect(line.onset).toBeCloseTo(4 + 1 / 1.2, 10)
    expect(separationCurve({ t, percent: t.map(() => 0.5) })).toMatchObject({
      model: 'none',
      onset: null,
      rate: null,
    })
    const spike = t.map((x) => (x === 3 ? 1.4 : 0.2))
    expect(separationCurve({ t, percent: spike }).model).toBe('none')
  })
})

describe('outlier', () => {
  const { table } = reference<{ grubbs: { table: { n: number; two_sided: Record<string, number> }[] } }>(
    'outliers-quantiles',
  ).grubbs

  it('critical values of Grubbs, two-sided (R 4.2.2; ASTM E178 to 0.001)', () => {
    for (const { n, two_sided } of table) {
      for (const [key, value] of Object.entries(two_sided)) {
        expectDigits(grubbsCritical(n, Number(key.slice(1))), value, 9)
      }
    }
  })

  it('names the value, or nothing where all are equal', () => {
    expect(outlier({ values: [5.51, 5.49, 5.52, 5.5, 5.71] })).toMatchObject({ index: 4, outlier: true })
    expect(outlier({ values: [2, 2, 2] })).toMatchObject({ g: null, index: 0, outlier: false })
  })
})
