import { describe, expect, it } from 'vitest'
import { filmThickness } from '@/lib/science/film'

describe('the film between packed drops', () => {
  it('is what cubes in a lattice have between them, up to the corners (geometry)', () => {
    // Cubes of side a, walls of thickness h between them: inside takes (a / (a + h))³. For a cube D[3,2] is its side.
    for (const [side, wall] of [
      [3.4, 0.034],
      [10, 0.02],
      [1, 0.001],
    ] as const) {
      const internalVolumePercent = 100 * (side / (side + wall)) ** 3
      const { filmNm } = filmThickness({ internalVolumePercent, diameterUm: side })
      expect(filmNm / (1000 * wall)).toBeGreaterThan(1)
      expect(filmNm / (1000 * wall)).toBeLessThan(1 + (1.1 * wall) / side)
    }
  })

  it('grows with the drops and shrinks with what is inside', () => {
    const at = (internalVolumePercent: number, diameterUm: number) =>
      filmThickness({ internalVolumePercent, diameterUm }).filmNm
    expect(at(86.3, 6.8)).toBeCloseTo(2 * at(86.3, 3.4), 9)
    expect(at(90, 3.4)).toBeLessThan(at(80, 3.4))
    expect(at(100, 3.4)).toBe(0)
  })

  it('refuses what is no share and no size', () => {
    for (const [internalVolumePercent, diameterUm] of [
      [0, 3],
      [101, 3],
      [80, 0],
      [80, NaN],
    ] as const)
      expect(() => filmThickness({ internalVolumePercent, diameterUm })).toThrow()
  })
})
