import { describe, expect, it } from 'vitest'
import { areaOf, centreOf, grow, inradius, shrink } from '@/components/charts/convex'
import { packDrops } from '@/components/charts/emulsion-packing'
import { closestPacking } from '@/lib/science/phase-fraction'
import { emulsionShapes, spotFor } from '@/components/charts/emulsion-shapes'
import { formulaJarShapes, placeLayers } from '@/components/charts/formula-jar-shapes'
import type { Point } from '@/components/marks/shape'

const square: Point[] = [
  [0, 0],
  [100, 0],
  [100, 100],
  [0, 100],
]

/** Whether a point lies strictly inside a clockwise convex outline. */
function holds(outline: Point[], [x, y]: Point): boolean {
  return outline.every(([ax, ay], index) => {
    const [bx, by] = outline[(index + 1) % outline.length]!
    return (bx - ax) * (y - ay) - (by - ay) * (x - ax) > 1e-6
  })
}

describe('convex outlines', () => {
  it('shrink, grow and measure as plane geometry says', () => {
    expect(areaOf(square)).toBe(10_000)
    expect(centreOf(square)).toEqual([50, 50])
    expect(areaOf(shrink(square, 10))).toBeCloseTo(6_400)
    expect(shrink(square, 50.1)).toEqual([])
    expect(inradius(square)).toBeCloseTo(50, 1)
    // A square of 80 grown by 10: 80² + 4 · 80 · 10 + 100π, less what chords cut off the arcs.
    expect(areaOf(grow(shrink(square, 10), 10))).toBeGreaterThan(9_909)
    expect(areaOf(grow(shrink(square, 10), 10))).toBeLessThan(9_915)
  })
})

describe('the cut through an emulsion', () => {
  const section = { width: 364, height: 494 }

  it('shows what is inside at the same share of area as of volume', () => {
    for (const phi of [0.1, 0.3, 0.55, 0.7, 0.74, 0.82, 0.863, 0.93, 0.97]) {
      const area = packDrops(phi, 88, section).reduce((sum, drop) => sum + areaOf(drop), 0)
      expect(area / (section.width * section.height)).toBeCloseTo(phi, 3)
    }
  })

  it('lets no two drops overlap', () => {
    for (const phi of [0.5, 0.74, 0.9]) {
      const drops = packDrops(phi, 88, section)
      const overlaps = drops.filter((drop, index) =>
        drops.some((other, at) => at !== index && drop.some((point) => holds(other, point))),
      )
      expect(overlaps).toEqual([])
    }
  })

  it('draws round drops below closest packing and flattened ones far above it', () => {
    const roundest = (phi: number) => {
      const whole = packDrops(phi, 88, section).filter((drop) =>
        drop.every(([x, y]) => x > 1 && y > 1 && x < section.width - 1 && y < section.height - 1),
      )
      const share = whole.map((drop) => {
        const around = drop.reduce((sum, [x, y], index) => {
          const [nextX, nextY] = drop[(index + 1) % drop.length]!
          return sum + Math.hypot(nextX - x, nextY - y)
        }, 0)
        return (4 * Math.PI * areaOf(drop)) / around ** 2
      })
      return share.reduce((sum, one) => sum + one, 0) / share.length
    }
    expect(roundest(0.5)).toBeGreaterThan(0.96)
    expect(roundest(0.95)).toBeLessThan(0.9)
    expect(closestPacking).toBeCloseTo(0.7405, 4)
  })

  it('is the same picture every time', () => {
    expect(packDrops(0.86, 88, section)).toEqual(packDrops(0.86, 88, section))
    expect(packDrops(0, 88, section)).toEqual([])
  })

  it('shows its scale only where drops were measured, and finds a place for each question', () => {
    const words = (dropMicrometres: number | null) =>
      emulsionShapes({ phi: 0.86, inside: 'water', dropMicrometres }, section).shapes.flatMap((shape) =>
        shape.kind === 'text' ? [shape.text] : [],
      )
    expect(words(3.4)).toEqual(['2 micrometres'])
    expect(words(null)).toEqual([])
    const { drops } = emulsionShapes({ phi: 0.86, inside: 'water', dropMicrometres: null }, section)
    const [x, y] = spotFor('drop', 200, drops, section)
    expect(drops.some((drop) => holds(drop, [x, y]))).toBe(true)
  })
})

describe('the jar if it all came apart', () => {
  const layers = [
    { id: 'a', name: 'Squalane', volumePercent: 20, phase: 'oil' as const },
    { id: 'b', name: 'Aqua', volumePercent: 70, phase: 'water' as const },
    { id: 'c', name: 'Isoamyl Laurate', volumePercent: 10, phase: 'oil' as const },
  ]

  it('stacks oil above water, each layer as high as its share of the volume', () => {
    const placed = placeLayers(layers, 500)
    expect(placed.map(({ id }) => id)).toEqual(['a', 'c', 'b'])
    const heights = placed.map(({ top, bottom }) => bottom - top)
    expect(heights[0]! / heights[1]!).toBeCloseTo(2)
    expect(heights[2]! / heights[0]!).toBeCloseTo(3.5)
  })

  it('draws a leader only to the rows it is told of', () => {
    const thin = (shapes: ReturnType<typeof formulaJarShapes>) =>
      shapes.filter((shape) => shape.kind === 'path' && shape.width === 0.9)
    expect(thin(formulaJarShapes(layers, 500, { a: 40, b: 80 }))).toHaveLength(2)
    expect(formulaJarShapes([], 500)).toHaveLength(1)
  })
})
