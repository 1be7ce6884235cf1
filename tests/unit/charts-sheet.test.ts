import { describe, expect, it } from 'vitest'
import { frontGeometry } from '@/components/charts/sheet-front'
import { nextPlace } from '@/components/charts/sheet-grid'
import { glyphHeight, jarShift, sheetLayout } from '@/components/charts/sheet-layout'
import type { SheetCell, SheetRow } from '@/components/charts/sheet-layout'
import { cellName } from '@/components/charts/sheet-names'
import { dayAfter, dayName, rulerDates, tagMiddle, timeScale } from '@/components/charts/time-scale'

const cell = (weeks: number, more: Partial<SheetCell> = {}): SheetCell => ({
  weeks,
  state: 'read',
  label: '0.0',
  separationPercent: 0,
  ...more,
})
const row = (id: string, cells: SheetCell[], more: Partial<SheetRow> = {}): SheetRow => ({
  id,
  label: id,
  kind: 'temperature',
  temperatureC: Number(id),
  note: 'oven 3',
  standing: 'steady',
  cells,
  ...more,
})
const sheet = (rows: SheetRow[], flags = 0) => ({
  startOn: '2026-09-08',
  endWeeks: 26,
  todayWeeks: 12,
  rows,
  flags: Array.from({ length: flags }, (_, index) => ({
    number: index + 1,
    sentence: 'Viscosity has used 92 % of its band.',
    rowId: '45',
    weeks: 10,
    href: '/flags/1',
    level: 'open' as const,
  })),
})

describe('time ruler', () => {
  it('is true to scale and knows its days', () => {
    const scale = timeScale(196, 1340, 26)
    expect(scale.x(12) - scale.x(10)).toBeCloseTo(scale.x(2) - scale.x(0))
    expect(scale.x(26)).toBe(1340)
    expect(dayAfter('2026-09-08', 8)).toBe('2026-11-03')
    expect(dayAfter('2026-09-08', 16)).toBe('2026-12-29')
    expect(dayName('2027-01-26', true)).toBe('26 Jan 2027')
  })

  it('writes the year where it changes and keeps clear of today', () => {
    const scale = timeScale(196, 1340, 26)
    const dates = rulerDates([0, 4, 8, 12, 16, 20, 26], '2026-09-08', scale, scale.x(12))
    expect(dates.map(({ text }) => text)).toEqual([
      '8 Sep',
      '6 Oct',
      '3 Nov',
      '29 Dec',
      '26 Jan 2027',
      '9 Mar',
    ])
  })
})

describe("today's tag", () => {
  it('stands over its day, and on the first and the last day beside it, so that nothing covers its word', () => {
    // The stations cover 168 of the sheet's width, and the study begins at 196.
    expect(tagMiddle(196, 168, 1360)).toBe(216)
    expect(tagMiddle(700, 168, 1360)).toBe(700)
    expect(tagMiddle(1340, 168, 1360)).toBe(1312)
  })
})

describe('sheet', () => {
  it('draws jars of 52 and, from seven rows on, of 40', () => {
    expect([1, 6, 7, 9].map(glyphHeight)).toEqual([52, 52, 40, 40])
  })

  it('grows sideways until no two jars of a shelf touch, fallen ones included', () => {
    const lying = [5, 6, 7, 8].map((weeks) => cell(weeks, { posture: 'lying' as const }))
    const layout = sheetLayout(sheet([row('45', lying)]), 390, 128)
    expect(layout.scale.x(6) - layout.scale.x(5)).toBeGreaterThanOrEqual(layout.glyph - 1e-9)
    expect(jarShift(lying[0]!, 52)).toBeGreaterThan(0)
    const roomy = sheetLayout(sheet([row('25', [cell(0), cell(4)])]), 1360, 196)
    expect(roomy.width).toBeCloseTo(1360)
  })

  it('keeps each flag sentence a line of its own above the jars', () => {
    const one = sheetLayout(sheet([row('45', [cell(0)])], 1), 1360, 196)
    const three = sheetLayout(sheet([row('45', [cell(0)])], 3), 1360, 196)
    expect(three.height - one.height).toBe(3 * 22 + 1 - 30)
  })

  it('names a cell by station, time, day and what was found', () => {
    const found = cell(10, { separationPercent: 24, posture: 'lying', flagNumbers: [36] })
    expect(cellName(row('45', [found]), found, '2026-09-08', 26)).toBe(
      '45 °C, week 10 (17 Nov 2026): separation 24.0 %, out, flag 36',
    )
  })
})

describe('front', () => {
  const rows = [
    { top: 0, bottom: 100, x: 300, isForecast: false },
    { top: 100, bottom: 200, x: 800, isForecast: true },
    { top: 200, bottom: 300, x: null, isForecast: false },
  ]

  it('washes what lies beyond it and nothing else', () => {
    expect(frontGeometry(rows, 600, 1000).wash).toEqual([
      { x: 300, y: 0, w: 700, h: 100 },
      { x: 800, y: 100, w: 200, h: 100 },
    ])
  })

  it('is solid where it happened and dashed where it is forecast', () => {
    const { solid, dashed } = frontGeometry(rows, 600, 1000)
    expect(solid).toEqual([
      { x1: 300, y1: 0, x2: 300, y2: 100 },
      { x1: 300, y1: 100, x2: 600, y2: 100 },
    ])
    expect(dashed).toEqual([
      { x1: 800, y1: 100, x2: 800, y2: 200 },
      { x1: 600, y1: 100, x2: 800, y2: 100 },
      { x1: 800, y1: 200, x2: 1000, y2: 200 },
    ])
  })

  it('is nowhere on a study that holds', () => {
    expect(frontGeometry([rows[2]!], 600, 1000)).toEqual({ wash: [], solid: [], dashed: [] })
  })
})

describe('grid', () => {
  const layout = sheetLayout(
    sheet([row('45', [cell(0), cell(2), cell(4)]), row('25', [cell(0), cell(4)])]),
    1360,
    196,
  )

  it('moves with the arrow keys and keeps to the same week from shelf to shelf', () => {
    expect(nextPlace('ArrowRight', { row: 0, cell: 0 }, layout.rows)).toEqual({ row: 0, cell: 1 })
    expect(nextPlace('ArrowRight', { row: 0, cell: 2 }, layout.rows)).toBeNull()
    expect(nextPlace('ArrowDown', { row: 0, cell: 2 }, layout.rows)).toEqual({ row: 1, cell: 1 })
    expect(nextPlace('ArrowUp', { row: 0, cell: 0 }, layout.rows)).toBeNull()
    expect(nextPlace('End', { row: 0, cell: 0 }, layout.rows)).toEqual({ row: 0, cell: 2 })
    expect(nextPlace('Enter', { row: 0, cell: 0 }, layout.rows)).toBeNull()
  })
})

describe('what a cell says besides its number', () => {
  const hot = row('45', [])
  const said = (more: Partial<SheetCell>) => cellName(hot, cell(2, more), '2026-09-08', 26)

  it('names a hairline as one, bleed and a cream layer beside it, and what happened to a jar', () => {
    expect(said({ isTrace: true, label: 'trace', separationPercent: 0.8 })).toMatch(
      /: separation a hairline$/,
    )
    expect(said({ bleed: 2, creamPercent: 5 })).toMatch(
      /: separation 0\.0 %, bleed 2 of 4, cream layer 5\.0 %$/,
    )
    expect(said({ mishaps: ['broken'] })).toMatch(/: separation 0\.0 %, broken$/)
    expect(said({ state: 'lost', mishaps: ['lost'] })).toMatch(/: lost$/)
  })
})
