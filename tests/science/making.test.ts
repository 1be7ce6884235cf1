import { describe, expect, it } from 'vitest'
import { ScienceError } from '@/lib/science/guard'
import { batchSizeFor, isBeyond, minutesBetween, netGrams, totalGrams } from '@/lib/science/making'

describe('grams at the balance', () => {
  it('are gross less tare and add up without the noise of binary fractions', () => {
    expect(netGrams(312.45, 32.4)).toBe(280.05)
    expect(totalGrams([0.1, 0.2])).toBe(0.3)
    expect(totalGrams([])).toBe(0)
    expect(() => totalGrams([1, -1])).toThrow(ScienceError)
  })

  it('are enough when the yield is taken off the size', () => {
    // 54 jars of 30 g at 3 % loss are 1670.1 g; 95 % of 1759 g are 1671.05 g, of 1758 g 1670.1 g.
    expect(batchSizeFor([(54 * 30) / 0.97], 95)).toBe(1759)
    expect(batchSizeFor([950], 95)).toBe(1000)
    expect(batchSizeFor([475, 475], 95)).toBe(1000)
    expect(() => batchSizeFor([100], 101)).toThrow(ScienceError)
  })
})

it('minutes are told to a tenth and never backwards', () => {
  expect(minutesBetween(0, 44.5 * 60_000)).toBe(44.5)
  expect(() => minutesBetween(1, 0)).toThrow(ScienceError)
})

it('the end of what is allowed is still inside', () => {
  expect(isBeyond(330, 300, 30)).toBe(false)
  expect(isBeyond(330.1, 300, 30)).toBe(true)
  expect(isBeyond(0.3, 0.1, 0.2)).toBe(false)
})
