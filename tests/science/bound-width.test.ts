import { describe, expect, it } from 'vitest'
import { boundWidening, boundWidth } from '@/lib/science/bound-width'
import { regression } from '@/lib/science/regression'

describe('the bound that a plan of times can give', () => {
  it('is t × √(1/n + squared distance ÷ sum of squares): tables give t 2.353 for three degrees of freedom', () => {
    // Times 0 to 4: mean 2, sum of squares 10; at the end 1/5 + 4/10 = 0.6.
    expect(boundWidth([0, 1, 2, 3, 4], 4)).toBeCloseTo(2.353 * Math.sqrt(0.6), 3)
    expect(boundWidth([0, 1, 2, 3, 4], 2)).toBeCloseTo(2.353 * Math.sqrt(0.2), 3)
  })

  it('is what a regression of readings at these times gives, in its residual SD', () => {
    const x = [0, 1, 3, 5, 8, 12]
    const y = [5.5, 5.47, 5.49, 5.44, 5.41, 5.4]
    const { predictions, residualSd } = regression({ x, y, confidence: 0.9, at: [12] })
    const { mean, meanLow } = predictions[0]!
    expect(boundWidth(x, 12)).toBeCloseTo((mean - meanLow) / residualSd, 9)
  })

  it('says by how much fewer times widen it, and refuses what has no line', () => {
    expect(boundWidening([0, 1, 2, 3, 4], [0, 1, 2, 3, 4], 4)).toBeCloseTo(0, 12)
    // Times 0, 2, 4: t 6.314 with one degree of freedom, 1/3 + 4/8.
    const expected = (6.314 * Math.sqrt(1 / 3 + 4 / 8)) / (2.353 * Math.sqrt(0.6)) - 1
    expect(boundWidening([0, 1, 2, 3, 4], [0, 2, 4], 4)).toBeCloseTo(100 * expected, 0)
    expect(() => boundWidth([0, 1], 1)).toThrow(/times/)
    expect(() => boundWidth([1, 1, 1], 1)).toThrow(/all the same/)
  })
})
