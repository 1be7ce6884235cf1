import { describe, expect, it } from 'vitest'
import { dropCount, dropsOf, readDrops } from '@/lib/batch/rules/droplets'
import { batchValue } from '@/lib/batch/rules/readings'

describe('drops counted under the microscope', () => {
  it('are read one by one or with how many there were, commas and points alike', () => {
    expect(readDrops('2,5 × 12; 3.5x30 4,1')).toEqual({ diametersUm: [2.5, 3.5, 4.1], counts: [12, 30, 1] })
    expect(readDrops('2.5\n3.5\n\n4')).toEqual({ diametersUm: [2.5, 3.5, 4], counts: [1, 1, 1] })
    expect(readDrops('2,5, 3,5')).toEqual({ diametersUm: [2.5, 3.5], counts: [1, 1] })
  })

  it('are refused with a sentence that names the one that is none', () => {
    for (const [typed, named] of [
      ['2.5; tiny', 'tiny'],
      ['2.5 × 1.5', '2.5×1.5'],
      ['0', '"0"'],
      ['-3', '"-3"'],
      ['2 × 3 × 4', '2×3×4'],
      ['3.5 × 0', '3.5×0'],
    ] as const)
      expect(readDrops(typed)).toContain(named)
    expect(readDrops('  ')).toContain('Type the diameters')
    expect(readDrops('1 '.repeat(10_000))).toContain('at most')
  })

  it('come to the Sauter mean, by hand: 2 of 1 and 1 of 2 micrometres', () => {
    // Sum of n·d³ ÷ sum of n·d²: (2·1 + 1·8) ÷ (2·1 + 1·4) = 10/6; by number (2·1 + 1·2) ÷ 3.
    const counted = readDrops('1 × 2; 2')
    if (typeof counted === 'string') throw new Error(counted)
    const drops = dropsOf(counted)
    expect(dropCount(counted)).toBe(3)
    expect(drops?.d32).toBeCloseTo(10 / 6, 12)
    expect(drops?.d10).toBeCloseTo(4 / 3, 12)
    const value = batchValue({ attribute: 'droplets', typed: '1 × 2; 2', detail: {} }, [])
    expect('value' in value && value.value).toBeCloseTo(10 / 6, 9)
  })

  it('with one size alone are that size, and nothing is made of it', () => {
    expect(batchValue({ attribute: 'droplets', typed: '3,4', detail: {} }, [])).toEqual({
      value: 3.4,
      detail: {},
    })
  })
})
