import { describe, expect, it } from 'vitest'
import { certifiedValue } from '@/lib/science/certificate'
import { reference } from './reference'

const { temperaturesC, phthalate } = reference<{
  temperaturesC: number[]
  phthalate: { ph: number[] }
}>('ph')
const lines = temperaturesC.map((temperatureC, i) => ({ temperatureC, value: phthalate.ph[i]! }))

describe("the value of a bottle's certificate", () => {
  // IUPAC 2002, as fixtures/reference/ph.json has it: 4.005 at 25 °C, 4.011 at 30 °C.
  it('is that of its line, and linear between two', () => {
    expect(certifiedValue(lines, 25)).toBe(4.005)
    expect(certifiedValue(lines.toReversed(), 27.5)).toBeCloseTo(4.008, 9)
  })

  it('holds 1 °C beyond its ends, and is refused further away', () => {
    const one = [{ temperatureC: 25, value: 5000 }]
    expect(certifiedValue(one, 24.2)).toBe(5000)
    expect(certifiedValue(one, 26)).toBe(5000)
    expect(() => certifiedValue(one, 27)).toThrow(/25 to 25 °C, not 27/)
    expect(() => certifiedValue([], 25)).toThrow('hold no value')
    expect(() => certifiedValue(one, Number.NaN)).toThrow('temperatureC')
  })
})
