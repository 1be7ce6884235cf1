import { grouped } from '@/lib/number/rules'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { Carry, carrySentence } from '@/components/charts/carry'
import { carryHeight, carryShapes } from '@/components/charts/carry-shapes'
import type { CarryInput } from '@/components/charts/carry-data'
import type { CurveSeries } from '@/components/charts/curve-data'
import {
  curveScale,
  doubtGroups,
  meanAt,
  niceTicks,
  plotCurve,
  spreadNames,
  washes,
} from '@/components/charts/curve-geometry'
import { curveShapes } from '@/components/charts/curve-shapes'
import { CurveTable } from '@/components/charts/curve-table'
import { shelfMiniShapes } from '@/components/charts/shelf-mini'
import { boundsOf } from '@/components/marks/place'

const series = (values: number[], more: Partial<CurveSeries> = {}): CurveSeries => ({
  id: '45',
  label: '45',
  kind: 'temperature',
  temperatureC: 45,
  standing: 'steady',
  points: values.map((value, weeks) => ({ weeks, value, text: `${value}` })),
  ...more,
})

const falling = series([50, 49, 48, 47], {
  trend: [0, 2, 4, 6, 8, 10].map((weeks) => ({
    weeks,
    mean: 50 - weeks,
    low: 49.5 - weeks,
    high: 50.5 - weeks,
  })),
})

describe('curve scale', () => {
  it('holds band and readings, and keeps zero at the foot of what starts there', () => {
    const scale = curveScale([series([0, 0.2, 0.4])], { upper: 2, text: 'allowed up to 2.0 %' })
    expect(scale.share(0)).toBe(0)
    expect(scale.share(2)).toBeLessThan(1)
    expect(scale.gap).toBeNull()
  })

  it('breaks above twice a limit that was far exceeded, and says how much smaller it goes on', () => {
    const scale = curveScale([series([0, 1, 24])], { upper: 2, text: '' })
    expect(scale.gap).not.toBeNull()
    expect(scale.share(4)).toBeCloseTo(scale.gap!.from)
    expect(scale.share(24)).toBeLessThanOrEqual(1)
    const below = scale.share(2) - scale.share(1)
    const above = (scale.share(24) - scale.share(14)) / 10
    expect(below / above).toBeCloseTo(scale.gap!.times, 0)
    const shares = scale.ticks.map(({ share }) => share)
    expect([...shares].sort((a, b) => a - b)).toEqual(shares)
  })

  it('takes round numbers for its ticks', () => {
    expect(niceTicks(34, 61, 5)).toEqual([35, 40, 45, 50, 55, 60])
    expect(niceTicks(0, 4, 4)).toEqual([0, 1, 2, 3, 4])
    expect(grouped(41_600, 0)).toBe('41\u2009600')
    expect(grouped(-0.4, 1)).toBe('\u22120.4')
  })

  it('washes what is outside the band on either side', () => {
    const band = { lower: 38.6, upper: 57.8, text: '' }
    const scale = curveScale([falling], band)
    expect(washes(band, scale)).toEqual([
      [0, scale.share(38.6)],
      [scale.share(57.8), 1],
    ])
    expect(washes(null, scale)).toEqual([])
  })
})

describe('a plotted curve', () => {
  const scale = curveScale([falling], { lower: 40, upper: 60, text: '' })

  it('is solid to its latest reading and forecast from there', () => {
    const curve = plotCurve(falling, scale, 10)
    expect(curve.trend.map(({ weeks }) => weeks)).toEqual([0, 2, 3])
    expect(curve.forecast.map(({ weeks }) => weeks)).toEqual([3, 4, 6, 8, 10])
    expect(curve.forecast[0]!.share).toBeCloseTo(scale.share(47))
    expect(curve.name.side).toBe('edge')
    expect(meanAt(falling.trend!, 3)).toBe(47)
  })

  it('keeps a doubted reading in sight and out of the line', () => {
    const doubted = series([50, 49, 48, 47])
    doubted.points[2]!.doubt = 'calibration overdue'
    const curve = plotCurve(doubted, scale, 10)
    expect(curve.measured.map(({ weeks }) => weeks)).toEqual([0, 1, 3])
    expect(doubtGroups([curve, curve])).toEqual([{ weeks: 2, low: scale.share(48), high: scale.share(48) }])
  })

  it('stops a forecast where it leaves the plot', () => {
    const steep = series([50, 40], {
      trend: [0, 1, 2, 50].map((weeks) => ({
        weeks,
        mean: 50 - 10 * weeks,
        low: 50 - 10 * weeks,
        high: 50 - 10 * weeks,
      })),
    })
    const curve = plotCurve(steep, scale, 50)
    expect(curve.forecast.every(({ share }) => share >= 0 && share <= 1)).toBe(true)
    expect(curve.forecast.at(-1)?.weeks ?? 0).toBeLessThan(50)
  })

  it('spreads names until they can be read, in order and within the plot', () => {
    expect(spreadNames([10, 12, 14], 19, 0, 100)).toEqual([10, 29, 48])
    const low = spreadNames([98, 99], 19, 0, 100)
    expect(low[1]).toBe(100)
    expect(low[1]! - low[0]!).toBe(19)
  })

  it('draws the same arrays for paper, within the page and without a missing number', () => {
    const shapes = curveShapes(
      {
        title: 'Viscosity',
        unit: ['mPa·s'],
        decimals: 0,
        band: { lower: 40, upper: 60, text: '' },
        series: [falling],
      },
      { endWeeks: 10, ticks: [{ weeks: 0, text: '0' }], markAt: 6, width: 500, height: 160 },
    )
    const { left, right, top, bottom } = boundsOf(shapes)
    expect([left, right, top, bottom].every(Number.isFinite)).toBe(true)
    expect(left).toBeGreaterThanOrEqual(0)
    expect(right).toBeLessThanOrEqual(500)
    expect(top).toBeGreaterThanOrEqual(0)
    expect(bottom).toBeLessThanOrEqual(160)
  })

  it('says everything in its table, doubted readings struck through', () => {
    const doubted = series([50, 49])
    doubted.points[1]!.doubt = 'calibration overdue'
    const table = renderToStaticMarkup(
      <CurveTable
        input={{ title: 'pH', unit: [], decimals: 2, band: null, series: [doubted] }}
        startOn="2026-09-08"
        endWeeks={26}
      />,
    )
    expect(table).toContain('8 Sep 2026')
    expect(table).toContain('<s title="calibration overdue">49</s>')
  })
})

describe('how far each attribute carries', () => {
  const input: CarryInput = {
    endMonths: 48,
    ticks: [0, 3, 6, 9, 12, 18, 24, 30, 36, 42, 48],
    readToMonths: 12,
    proposedMonths: 18,
    capMonths: 24,
    capText: 'cap: twice 12',
    attributes: [
      {
        key: 'v',
        name: 'Viscosity',
        months: 23.2,
        isLimiting: true,
        readings: [{ months: 0, marks: ['read'] }],
      },
      { key: 's', name: 'Separation', months: null, isLimiting: false, readings: [] },
    ],
  }

  it('says in a sentence what it draws', () => {
    expect(carrySentence(input)).toBe(
      'Viscosity carries 23.2 months; Separation stays inside past 48 months; the cap is 24 months; 18 months are proposed.',
    )
    expect(renderToStaticMarkup(<Carry {...input} />)).toContain('Viscosity carries 23.2 months')
  })

  it('is true to scale and stays on its page at every width', () => {
    for (const width of [358, 740, 972]) {
      const shapes = carryShapes(input, width)
      const { left, right, bottom } = boundsOf(shapes)
      expect(left).toBeGreaterThanOrEqual(-2)
      expect(right).toBeLessThanOrEqual(width + 2)
      expect(bottom).toBeLessThanOrEqual(carryHeight(input))
    }
    const washOf = carryShapes(input, 972).find((shape) => shape.kind === 'rect' && shape.fill === 'wash')
    expect(washOf).toMatchObject({ x: 196 + (23.2 / 48) * (950 - 196) })
  })
})

describe("a ledger row's shelf", () => {
  it('is a line as far as today and a hairline after', () => {
    const [done, toCome] = shelfMiniShapes({ temperatureC: 45, endWeeks: 26, todayWeeks: 13, cells: [] }, 346)
    expect(done).toMatchObject({ x1: 0, stroke: 'ink' })
    expect(toCome).toMatchObject({ x2: 346, width: 1 })
    expect(
      shelfMiniShapes({ temperatureC: 45, endWeeks: 26, todayWeeks: null, cells: [] }, 346),
    ).toHaveLength(1)
  })
})
