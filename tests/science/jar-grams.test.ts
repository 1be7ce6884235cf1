import { describe, expect, it } from 'vitest'
import { ScienceError } from '@/lib/science/guard'
import { fillFromGrams, gramsOfJars, jarsFromGrams } from '@/lib/science/jar-grams'
import { massChangePercent } from '@/lib/science/mass-change'
import { percentFrom, percentOf } from '@/lib/science/percent'
import { joining, volumeShares } from '@/lib/science/volume-share'

describe('grams of jars', () => {
  it('30 jars of 50 g take 1 600 g where a sixteenth is lost, and 1 600 g fill 30', () => {
    expect(gramsOfJars(30, 50, 6.25)).toBe(1600)
    expect(jarsFromGrams(1600, 50, 6.25)).toBe(30)
    expect(jarsFromGrams(1599, 50, 6.25)).toBe(29)
    expect(jarsFromGrams(-3, 50, 6.25)).toBe(0)
    expect(fillFromGrams(1600, 31, 6.25)).toBe(48.3)
    expect(() => gramsOfJars(1, 50, 100)).toThrow(ScienceError)
  })
})

describe('percent of a whole', () => {
  it('is signed by the part, and none of nothing', () => {
    expect(percentOf(-1, 4)).toBe(-25)
    expect(percentOf(1, -4)).toBe(25)
    expect(percentFrom(5030, 5000)).toBeCloseTo(0.6, 12)
    expect(() => percentOf(1, 0)).toThrow(ScienceError)
  })

  it('of the fill is what a jar lost: 0.5 g of 50 g', () => {
    expect(massChangePercent(150, 100, 149.5)).toBe(-1)
    expect(() => massChangePercent(100, 100, 99)).toThrow(ScienceError)
  })
})

describe('shares of volume', () => {
  it('are those of mass over density', () => {
    expect(
      volumeShares([
        { mass: 80, density: 1 },
        { mass: 16, density: 0.8 },
      ]),
    ).toEqual([80, 20])
    expect(() => volumeShares([{ mass: 0, density: 1 }])).toThrow(ScienceError)
  })

  it('inside an emulsion in the making reach 0.74 where the drops are packed', () => {
    const { fractionAt, packedShare } = joining([{ mass: 85, density: 1 }], [{ mass: 15, density: 1 }])!
    expect(fractionAt(1)).toBeCloseTo(0.85, 12)
    expect(fractionAt(packedShare)).toBeCloseTo(0.74, 12)
    expect(joining([], [{ mass: 15, density: 1 }])).toBeNull()
  })
})
