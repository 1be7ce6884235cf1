import { describe, expect, it } from 'vitest'
import { bandBarShapes, bandScale } from '@/components/marks/band-bar-shapes'
import { boundsOf } from '@/components/marks/place'
import type { Circle, Path, Shape } from '@/components/marks/shape'

const viscosity = { width: 250, lower: 38_600, upper: 57_800, initial: 48_200 }
const circles = (shapes: Shape[]) => shapes.filter((shape): shape is Circle => shape.kind === 'circle')
const arrows = (shapes: Shape[]) =>
  shapes.filter((shape): shape is Path => shape.kind === 'path' && shape.join === 'round')

describe('band bar', () => {
  it('is a level: values lie on one straight scale with the band', () => {
    const { place } = bandScale(viscosity)
    const [low, middle, high] = [place(38_600), place(48_200), place(57_800)]
    expect(middle - low).toBeCloseTo(high - middle)
    expect(low).toBeGreaterThan(0)
    expect(high).toBeLessThan(250)
  })

  it('shows the last hollow and the new value solid', () => {
    const [last, now] = circles(bandBarShapes({ ...viscosity, last: 44_000, now: 47_000 }))
    expect(last).toMatchObject({ fill: 'paper', stroke: 'ink' })
    expect(now).toMatchObject({ fill: 'ink' })
    expect(last!.cx).toBeLessThan(now!.cx)
  })

  it('rings what has used four fifths of its band and reddens what is past it', () => {
    const ringed = circles(bandBarShapes({ ...viscosity, now: 40_000 }))
    expect(ringed).toHaveLength(2)
    expect(ringed[1]).toMatchObject({ stroke: 'alarm' })
    expect(circles(bandBarShapes({ ...viscosity, now: 45_000 }))).toHaveLength(1)
    expect(circles(bandBarShapes({ ...viscosity, now: 37_000 }))).toMatchObject([{ fill: 'alarm' }])
  })

  it('points with an arrow at what is off the scale, and never past its own end', () => {
    for (const now of [1_000, 900_000]) {
      const shapes = bandBarShapes({ ...viscosity, now })
      expect(circles(shapes)).toEqual([])
      expect(arrows(shapes)).toMatchObject([{ fill: 'alarm' }])
      const { left, right } = boundsOf(arrows(shapes))
      expect(left).toBeGreaterThanOrEqual(-0.5)
      expect(right).toBeLessThanOrEqual(250.5)
    }
  })

  it('makes room on a one-sided scale for what can still be shown', () => {
    const separation = { width: 168, upper: 2, initial: 0 }
    expect(circles(bandBarShapes({ ...separation, last: 16.8, now: 24 }))).toHaveLength(2)
    expect(bandScale({ ...separation, now: 1 }).max).toBeCloseTo(6)
    expect(arrows(bandBarShapes({ ...separation, now: 80 }))).toHaveLength(1)
  })

  it('is dotted where there is no band yet', () => {
    const [line] = bandBarShapes({ width: 250, last: 5, now: 6 })
    expect(line).toMatchObject({ kind: 'line', cap: 'round' })
    expect(bandBarShapes({ width: 250 })).toHaveLength(1)
  })

  it('rings a value near the edge, alarms at one beyond it, and does neither inside', () => {
    const look = (now: number, more = {}) => {
      const found = circles(bandBarShapes({ ...viscosity, ...more, now }))
      return [found.length, found[0]?.fill]
    }
    // 9 600 from the initial to either edge: 0.5, 0.79 and 0.81 of it, the edge itself, and past it.
    expect(look(43_400)).toEqual([1, 'ink'])
    expect(look(48_200 - 0.79 * 9_600)).toEqual([1, 'ink'])
    expect(look(48_200 - 0.81 * 9_600)).toEqual([2, 'ink'])
    expect(look(57_800)).toEqual([2, 'ink'])
    expect(look(57_801)).toEqual([1, 'alarm'])
    // Without an initial there is no way used, but beyond is beyond.
    expect(look(57_000, { initial: null })).toEqual([1, 'ink'])
    expect(look(57_801, { initial: null })).toEqual([1, 'alarm'])
  })
})
