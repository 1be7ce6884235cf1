import { describe, expect, it } from 'vitest'
import { movedElsewhere } from '@/lib/science/elsewhere'

const of = (...shifts: number[]) =>
  movedElsewhere(shifts.map((shift) => ({ difference: shift * 2, scatter: 2 })))

describe('an instrument elsewhere on the same day', () => {
  it('moved where three read beyond their scatter on one side, whichever side', () => {
    expect(of(1.5, 1.2, 1.1)).toBe('moved')
    expect(of(-1.5, -1.2, -1.1, 0.2)).toBe('moved')
  })

  it('is steady where they lie within it, untold with two or where one alone is far off', () => {
    expect(of(0.5, -0.7, 0.2)).toBe('steady')
    expect(of(1.5, 1.2)).toBe('untold')
    expect(of(0.5, 2.5, -0.1)).toBe('untold')
  })
})
