import fc from 'fast-check'
import { expect, it } from 'vitest'
import { fitHinge } from '@/lib/science/hinge'

/** Least squares over a slope are a formula; over the start they are searched for on a grid (arithmetic, no source). */
function squaresFrom(x: number[], y: number[], start: number): number {
  const beyond = x.map((value) => Math.max(0, value - start))
  const far = beyond.reduce((sum, b) => sum + b * b, 0)
  const slope = far === 0 ? 0 : Math.max(0, beyond.reduce((sum, b, i) => sum + b * y[i]!, 0) / far)
  return beyond.reduce((sum, b, i) => sum + (y[i]! - slope * b) ** 2, 0)
}

it('no start on a fine grid fits better than the one found', () => {
  const point = fc.record({ x: fc.integer({ min: 0, max: 104 }), y: fc.integer({ min: 0, max: 300 }) })
  fc.assert(
    fc.property(fc.array(point, { minLength: 3, maxLength: 30 }), (points) => {
      const x = points.map((one) => one.x).sort((a, b) => a - b)
      const y = points.map((one) => one.y / 10)
      fc.pre(x[0] !== x.at(-1))
      const found = fitHinge(x, y)
      const all = y.reduce((sum, value) => sum + value ** 2, 0)
      expect(squaresFrom(x, y, found.start)).toBeCloseTo(found.squares, 6)
      for (let start = x[0]!; start < 104; start += 0.25) {
        expect(found.squares).toBeLessThanOrEqual(squaresFrom(x, y, start) + 1e-9 * all)
      }
    }),
  )
})

it('finds the hinge that thousands of points were drawn from', () => {
  const x = Array.from({ length: 20_000 }, (_, i) => i / 200)
  const y = x.map((week) => 0.4 * Math.max(0, week - 31.3))
  const { start, slope, squares } = fitHinge(x, y)
  expect(start).toBeCloseTo(31.3, 9)
  expect(slope).toBeCloseTo(0.4, 9)
  expect(squares).toBeCloseTo(0, 9)
})
