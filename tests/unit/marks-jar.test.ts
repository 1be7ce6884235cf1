import { describe, expect, it } from 'vitest'
import { boundsOf } from '@/components/marks/place'
import { jarFrame, jarWall } from '@/components/marks/jar-frame'
import { jarPitch, jarShapes, rightFoot } from '@/components/marks/jar-shapes'
import type { Path, Rect, Shape } from '@/components/marks/shape'

const layersOf = (shapes: Shape[], role: 'water' | 'oil' | 'oilLine' | 'cream') =>
  shapes.filter((shape): shape is Path | Rect => 'fill' in shape && shape.fill === role)

const heightOf = (shape: Shape) => {
  const { top, bottom } = boundsOf([shape])
  return bottom - top
}

describe('jar', () => {
  it('keeps its proportions at every height: width 0.6, lid 0.115, headspace 0.05', () => {
    for (const height of [16, 26, 34, 52, 200, 400]) {
      const frame = jarFrame(height)
      expect(frame.halfWidth * 2).toBeCloseTo(0.6 * height)
      expect(frame.lidHeight).toBeCloseTo(0.115 * height)
      expect(height - frame.lidHeight + frame.fillTop).toBeCloseTo(0.05 * height)
      const body = boundsOf(jarShapes({ height }))
      expect(-body.top).toBeCloseTo(height)
      expect(body.bottom).toBeCloseTo(0)
    }
  })

  it('draws its glass thicker as it grows', () => {
    expect([16, 26, 34, 52, 60].map(jarWall)).toEqual([1.2, 1.5, 1.5, 1.75, 2.25])
  })

  it('draws layers to the scale of the fill', () => {
    const frame = jarFrame(200)
    const fill = frame.fillBottom - frame.fillTop
    const shapes = jarShapes({ height: 200, topPercent: 9, bottomPercent: 22 })
    expect(heightOf(layersOf(shapes, 'water')[0]!)).toBeCloseTo(0.22 * fill)
    expect(heightOf(layersOf(shapes, 'oil')[0]!)).toBeCloseTo(0.09 * fill)
  })

  it('never lets a layer vanish: one pixel at least, and plain below three', () => {
    const shapes = jarShapes({ height: 16, bottomPercent: 1.5, topPercent: 1.5 })
    expect(heightOf(layersOf(shapes, 'water')[0]!)).toBeCloseTo(1)
    expect(heightOf(layersOf(shapes, 'oilLine')[0]!)).toBeCloseTo(1)
    expect(layersOf(shapes, 'oil')).toEqual([])
  })

  it('draws what is under the detection limit as a hairline, however large the jar', () => {
    const shapes = jarShapes({ height: 400, bottomPercent: 1.9, detectionPercent: 2 })
    expect(heightOf(layersOf(shapes, 'water')[0]!)).toBeCloseTo(1)
    const above = jarShapes({ height: 400, bottomPercent: 2, detectionPercent: 2 })
    expect(heightOf(layersOf(above, 'water')[0]!)).toBeGreaterThan(6)
    expect(layersOf(jarShapes({ height: 400, bottomPercent: 0 }), 'water')).toEqual([])
  })

  it('keeps hatching and dots within their layer', () => {
    const frame = jarFrame(52)
    const shapes = jarShapes({ height: 52, bottomPercent: 30, topPercent: 12 })
    const texture = shapes.filter(
      (shape): shape is Path => shape.kind === 'path' && (shape.fill === 'cream' || shape.fill === 'dot'),
    )
    for (const shape of texture) {
      const { left, right, top, bottom } = boundsOf([shape])
      expect(left).toBeGreaterThanOrEqual(-frame.halfInside - 1e-6)
      expect(right).toBeLessThanOrEqual(frame.halfInside + 1e-6)
      expect(top).toBeGreaterThanOrEqual(frame.fillTop - 1e-6)
      expect(bottom).toBeLessThanOrEqual(frame.fillBottom + 1e-6)
    }
    expect(texture).toHaveLength(3)
  })

  it('leans 12 degrees about its right foot, which stays on the shelf', () => {
    const frame = jarFrame(100)
    const [, y] = rightFoot(frame, 'leaning')
    expect(y).toBeCloseTo(0)
    const upright = jarShapes({ height: 100 })[1] as Path
    const leaning = jarShapes({ height: 100, posture: 'leaning' })[1] as Path
    const angle = (path: Path) => {
      const [from, to] = [path.steps[0]!, path.steps[1]!] as [['M', number, number], ['L', number, number]]
      return Math.atan2(to[1] - from[1], to[2] - from[2])
    }
    expect(((angle(upright) - angle(leaning)) * 180) / Math.PI).toBeCloseTo(12)
  })

  it('falls to the right: as long as it was high, its lid at the right end, its layers turned with it', () => {
    const shapes = jarShapes({ height: 100, posture: 'lying', bottomPercent: 30, topPercent: 10 })
    const { left, right, top, bottom } = boundsOf(shapes)
    expect(right - left).toBeCloseTo(100)
    expect(bottom - top).toBeCloseTo(62.4)
    expect(jarPitch(100, 'lying')).toBe(100)
    const water = boundsOf(layersOf(shapes, 'water'))
    const oil = boundsOf(layersOf(shapes, 'oil'))
    expect(water.left).toBeLessThan(-40)
    expect(water.right).toBeLessThan(oil.left)
  })

  it('takes the alarm colour when it leans or lies and keeps to ink while it stands', () => {
    const strokes = (shapes: Shape[]) =>
      new Set(shapes.map((shape) => ('stroke' in shape ? shape.stroke : null)))
    expect(strokes(jarShapes({ height: 52, posture: 'leaning' }))).toContain('alarm')
    expect(strokes(jarShapes({ height: 52, posture: 'lying' }))).not.toContain('ink')
    expect(strokes(jarShapes({ height: 52 }))).not.toContain('alarm')
  })

  it('tells due from planned by colour alone of the dots, and crosses out what was missed', () => {
    const [due] = jarShapes({ height: 52, state: 'due' })
    const [planned] = jarShapes({ height: 52, state: 'planned' })
    expect(due).toMatchObject({ stroke: 'ink', cap: 'round', dash: [0.01, expect.any(Number)] })
    expect({ ...due, stroke: 'rule' }).toEqual(planned)
    expect(jarShapes({ height: 52, state: 'missed' })).toHaveLength(2)
  })
})

describe('what is noted beside the layers', () => {
  const drawn = (more: object) => jarShapes({ height: 52, ...more })

  it('is drops on the wall, more by grade, none where a jar is too small for them', () => {
    const count = (bleed: number, height = 52) =>
      jarShapes({ height, bleed }).filter((shape) => shape.kind === 'circle').length
    expect([0, 1, 2, 3, 4].map((grade) => count(grade))).toEqual([0, 2, 3, 4, 5])
    expect(count(4, 14)).toBe(0)
  })

  it('is the lower edge of a cream layer, under the oil that floats on it', () => {
    const edge = (more: object) => {
      const [line] = drawn(more).flatMap((shape) => (shape.kind === 'line' && shape.dash ? [shape.y1] : []))
      return line
    }
    expect(edge({})).toBeUndefined()
    const frame = jarFrame(52)
    expect(edge({ creamPercent: 50 })).toBeCloseTo((frame.fillTop + frame.fillBottom) / 2)
    expect(edge({ creamPercent: 50, topPercent: 10 })!).toBeGreaterThan(edge({ creamPercent: 50 })!)
  })
})
