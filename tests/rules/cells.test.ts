import { describe, expect, it } from 'vitest'
import { cellsOf } from '@/lib/study/rules/cells'

type Input = Parameters<typeof cellsOf>[2]
type Mishaps = NonNullable<Input['pullJars'][number]['mishaps']>

const jar = (state: string, jarState: string, mishaps: Mishaps = []): Input['pullJars'][number] => ({
  ...{ pullId: 'p', studyStationId: 's', batchId: 'b', timeWeeks: 2, label: 'week 2', asks: 'watch' },
  ...{ dueOn: '2026-11-16', windowFrom: '2026-11-15', windowTo: '2026-11-17', code: 'K7R2' },
  ...{ state, jarState, mishaps },
})
const happened = (kind: Mishaps[number]['kind']): Mishaps => [
  { kind, code: 'K7R2', reason: 'slipped', by: 'MA', at: '2026-11-16T09:00:00Z' },
]
const finding = {
  ...{ initial: 0, band: { lower: null, upper: 5 }, points: [], latest: null, latestTime: null },
} as unknown as Input['series'][number]['finding']

function cell(detail: Input['readings'][number]['detail'], value: number, jars = [jar('done', 'stored')]) {
  const reading = { id: 'r', batchId: 'b', studyStationId: 's', pullId: 'p', attribute: 'separation' }
  const isRead = jars.some((one) => one.state === 'done')
  return cellsOf('b', 's', {
    ...{ pullJars: jars, fillHeightMm: 60, today: '2026-12-01', plan: { attributes: [] } },
    readings: isRead ? [{ ...reading, value, readBy: 'MA', detail }] : [],
    series: [{ batchId: 'b', studyStationId: 's', attribute: 'separation', standing: 'steady', finding }],
  })[1]!
}

describe('a cell of the sheet', () => {
  it('writes a layer too thin for the ruler as a hairline and not as its number', () => {
    // A ruler of 1 mm on a fill of 60 mm tells 1.7 %.
    const seen = cell({ bottomMm: 0.5, totalMm: 60, isUnderRuler: true, rulerMm: 1 }, 0.833)
    expect(seen).toMatchObject({ label: 'trace', isTrace: true })
    expect(seen.values[0]!.text).toBe('hairline, under 1.7 %')
    const read = cell({ bottomMm: 2, totalMm: 60 }, 3.333)
    expect(read).toMatchObject({ label: '3.3', isTrace: false })
    expect(read.values[0]!.text).toBe('3.3 %')
  })

  it('keeps bleed and a cream layer beside the separation', () => {
    expect(cell({ bottomMm: 0, totalMm: 60, bleed: 2, creamPercent: 5 }, 0)).toMatchObject({
      ...{ label: '0.0', bleed: 2, creamPercent: 5 },
    })
  })

  it('tells what happened: broken and lost apart, and beside a jar that was read', () => {
    expect(cell({}, 0, [jar('missed', 'lost', happened('broken'))]).state).toBe('broken')
    expect(cell({}, 0, [jar('missed', 'lost', happened('lost'))])).toMatchObject({
      ...{ state: 'lost', label: 'lost' },
    })
    const both = cell({ bottomMm: 0 }, 0, [jar('done', 'stored'), jar('missed', 'lost', happened('broken'))])
    expect(both).toMatchObject({ state: 'read', mishaps: [{ kind: 'broken', reason: 'slipped' }] })
  })
})
