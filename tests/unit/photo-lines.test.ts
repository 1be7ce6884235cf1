import { describe, expect, it } from 'vitest'
import { firstLines, moved, nearestLine } from '@/components/photo/lines'
import { valueOf } from '@/lib/reading/rules/value'
import { separationOfLines } from '@/lib/science/photo-lines'

// Geometry by hand: heights between lines over the height from base to fill top.

const lines = { fillTop: 100, topEdge: 140, bottomEdge: 460, base: 500 }

describe('lines on a photo', () => {
  it('give the layers as percent of the fill', () => {
    expect(separationOfLines(lines)).toEqual({ topPercent: 10, bottomPercent: 10, percent: 20 })
    expect(() => separationOfLines({ ...lines, topEdge: 470 })).toThrow(/one above the other/)
    expect(() => separationOfLines({ ...lines, base: 90 })).toThrow(/below/)
  })

  it('move no further than their neighbours, and an inner line of no layer goes along', () => {
    expect(moved(lines, 'topEdge', 480, 800).topEdge).toBe(460)
    expect(moved(lines, 'bottomEdge', 20, 800).bottomEdge).toBe(140)
    expect(moved(lines, 'base', 900, 800).base).toBe(800)
    expect(moved(lines, 'fillTop', 300, 800).fillTop).toBe(139)
    const none = { fillTop: 100, topEdge: 100, bottomEdge: 500, base: 500 }
    expect(moved(none, 'fillTop', 80, 800)).toMatchObject({ fillTop: 80, topEdge: 80 })
    expect(moved(none, 'base', 520, 800)).toMatchObject({ bottomEdge: 520, base: 520 })
    expect(firstLines(1000)).toMatchObject({ fillTop: 300, topEdge: 300, bottomEdge: 850, base: 850 })
  })

  it('are picked by the finger: the nearest, and of two in one row the one that can follow it', () => {
    expect(nearestLine(lines, 150)).toBe('topEdge')
    expect(nearestLine({ ...lines, topEdge: 100 }, 103)).toBe('topEdge')
    expect(nearestLine({ ...lines, topEdge: 100 }, 97)).toBe('fillTop')
    expect(nearestLine({ ...lines, bottomEdge: 500 }, 503)).toBe('base')
  })
})

describe('a reading measured on a photo', () => {
  const jar = { tareG: null, grossG: null, fillHeightMm: 40 }
  const read = (change: object, topMm = 4) =>
    valueOf(
      {
        attribute: 'separation',
        typed: '4.0 mm top, 4.0 mm below, on the photo',
        detail: {
          ...{ topMm, bottomMm: 4, totalMm: 40 },
          photoLines: {
            ...{ photoId: '01900000-0000-7000-8000-000000000001', width: 600, height: 800, axisX: 300 },
            ...{ tiltDegrees: 1, proposal: null, lines: { ...lines, ...change } },
          },
        },
      },
      { planned: null, jar, spindles: [], last: null },
    )

  it('R11: is computed again from its lines, which stay with it', () => {
    const { value, detail } = read({})
    expect(value).toBe(20)
    expect(detail['photoLines']).toMatchObject({ lines })
  })

  it('R11: is refused where the lines are out of order or say something else than the heights', () => {
    expect(() => read({ topEdge: 470 })).toThrow(/out of order/)
    expect(() => read({ base: 100 })).toThrow(/out of order/)
    expect(() => read({}, 5)).toThrow(/do not say the same/)
  })
})
