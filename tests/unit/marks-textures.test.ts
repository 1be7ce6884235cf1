import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { boundsOf } from '@/components/marks/place'
import type { Point, Step } from '@/components/marks/shape'
import { dots, stripes } from '@/components/marks/texture'

/** Area of all closed polygons of a path (shoelace). */
function area(steps: Step[]): number {
  let sum = 0
  let polygon: Point[] = []
  for (const step of steps) {
    if (step[0] === 'M') polygon = [[step[1], step[2]]]
    else if (step[0] === 'L') polygon.push([step[1], step[2]])
    else if (step[0] === 'Z') {
      const twice = polygon.reduce((total, [x, y], index) => {
        const [nextX, nextY] = polygon[(index + 1) % polygon.length]!
        return total + x * nextY - nextX * y
      }, 0)
      sum += Math.abs(twice) / 2
    }
  }
  return sum
}

const box = (left: number, top: number, width: number, height: number): Point[] => [
  [left, top],
  [left + width, top],
  [left + width, top + height],
  [left, top + height],
]

describe('textures', () => {
  it('cover their share of a large area', () => {
    const covered = area(stripes(box(0, 0, 400, 400), 4, 1.3, 'rising'))
    expect(covered / (400 * 400)).toBeCloseTo(1.3 / 4, 2)
  })

  it('never leave the outline they were given', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -50, max: 50 }),
        fc.integer({ min: -50, max: 50 }),
        fc.integer({ min: 1, max: 120 }),
        fc.integer({ min: 1, max: 60 }),
        fc.constantFrom('rising' as const, 'falling' as const),
        (x, y, width, height, slant) => {
          const steps = stripes(box(x, y, width, height), 5, 1, slant)
          if (steps.length === 0) return
          const found = boundsOf([{ kind: 'path', steps }])
          expect(found.left).toBeGreaterThanOrEqual(x - 1e-6)
          expect(found.right).toBeLessThanOrEqual(x + width + 1e-6)
          expect(found.top).toBeGreaterThanOrEqual(y - 1e-6)
          expect(found.bottom).toBeLessThanOrEqual(y + height + 1e-6)
        },
      ),
    )
  })

  it('draw whole dots only', () => {
    const steps = dots({ left: 0, top: 0, right: 30, bottom: 5 }, 4, 0.75)
    const found = boundsOf([{ kind: 'path', steps }])
    expect(found.left).toBeGreaterThanOrEqual(0)
    expect(found.right).toBeLessThanOrEqual(30)
    expect(steps.filter((step) => step[0] === 'M').length).toBeGreaterThan(6)
  })
})
