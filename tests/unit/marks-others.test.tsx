import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { hashCombShapes } from '@/components/marks/hash-comb-shapes'
import { heatLine, heatMarker, heatWeight } from '@/components/marks/heat'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { boundsOf } from '@/components/marks/place'
import type { Rect } from '@/components/marks/shape'
import { shelfShapes } from '@/components/marks/shelf-shapes'
import { standingShapes } from '@/components/marks/standing-shapes'

describe('heat', () => {
  it('is weight, line and marker at the stations of the table', () => {
    const table = [
      [-10, 220, 0.75, 'diamond'],
      [5, 300, 1, 'circle'],
      [25, 430, 1.75, 'square'],
      [40, 640, 3, 'triangle-up'],
      [45, 720, 4, 'triangle-down'],
      [50, 800, 5, 'cross'],
    ] as const
    for (const [celsius, weight, line, marker] of table)
      expect([heatWeight(celsius), heatLine(celsius), heatMarker(celsius)]).toEqual([weight, line, marker])
  })

  it('grows between them and stays level beyond', () => {
    expect(heatWeight(30)).toBe(500)
    expect(heatWeight(-20)).toBe(220)
    expect(heatLine(60)).toBe(5)
  })
})

describe('standing mark', () => {
  it('stands hollow, tilts hollow in alarm, lies solid in alarm, or is dotted', () => {
    expect(standingShapes({ standing: 'steady', size: 20 })[0]).toMatchObject({ stroke: 'ink' })
    expect(standingShapes({ standing: 'steady', size: 20 })[0]).not.toHaveProperty('fill')
    expect(standingShapes({ standing: 'leaning', size: 20 })[0]).toMatchObject({ stroke: 'alarm' })
    expect(standingShapes({ standing: 'out', size: 20 })[0]).toMatchObject({ fill: 'alarm' })
    expect(standingShapes({ standing: 'untold', size: 20 })[0]).toMatchObject({ cap: 'round' })
  })

  it('fits its size and rests on its line', () => {
    for (const size of [16, 20, 26] as const) {
      const upright = boundsOf(standingShapes({ standing: 'steady', size }))
      expect(-upright.top).toBeCloseTo(size)
      const lying = boundsOf(standingShapes({ standing: 'out', size }))
      expect(lying.right - lying.left).toBeLessThanOrEqual(size + 0.5)
      expect(lying.bottom).toBeLessThan(1)
    }
  })
})

describe('shelf', () => {
  it('is as thick as its station is hot and dotted where it is still to come', () => {
    const [solid, dotted] = shelfShapes({ width: 100, temperatureC: 45, dottedFrom: 60 })
    expect(solid).toMatchObject({ x1: 0, x2: 60, width: 4 })
    expect(dotted).toMatchObject({ x1: 60, x2: 100, width: 4, cap: 'round' })
    expect(shelfShapes({ width: 100, temperatureC: 5 })).toHaveLength(1)
  })
})

describe('hash comb', () => {
  const sha256 = '0f'.repeat(32)

  it('draws one height a digit, from a sixteenth to the whole', () => {
    const teeth = hashCombShapes(sha256, { width: 320, height: 32 }).filter(
      (shape): shape is Rect => shape.kind === 'rect',
    )
    expect(teeth).toHaveLength(64)
    expect(teeth[0]!.h).toBeCloseTo(2)
    expect(teeth[1]!.h).toBeCloseTo(32)
  })

  it('shows a single changed digit and refuses what is no hash', () => {
    const other = `1${sha256.slice(1)}`
    expect(hashCombShapes(other, { width: 320, height: 32 })[0]).not.toEqual(
      hashCombShapes(sha256, { width: 320, height: 32 })[0],
    )
    expect(() => hashCombShapes('abc', { width: 320, height: 32 })).toThrow(RangeError)
  })
})

describe('jar glyph', () => {
  it('has an accessible name when given one and is silent beside words', () => {
    const named = renderToStaticMarkup(<JarGlyph height={26} title="45 °C, week 10, 24.0 % separated" />)
    expect(named).toContain('role="img"')
    expect(named).toContain('aria-label="45 °C, week 10, 24.0 % separated"')
    expect(renderToStaticMarkup(<JarGlyph height={26} />)).toContain('aria-hidden="true"')
  })

  it('uses no pattern, clip or transform, which the PDF could not draw', () => {
    const svg = renderToStaticMarkup(
      <JarGlyph height={52} posture="leaning" topPercent={9} bottomPercent={22} kind="watch" />,
    )
    expect(svg).not.toMatch(/<pattern|clip|transform|NaN|undefined/)
  })
})
