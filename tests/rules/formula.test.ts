import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { formulaFinding } from '@/lib/formula/rules/finding'
import { percentText } from '@/lib/formula/rules/numbers'
import { grouped, readDecimal, readScaled } from '@/lib/number/rules'
import { formulaTotals, phaseTotals, remainderThousandths } from '@/lib/formula/rules/totals'

describe('numbers as people type them', () => {
  it('reads decimal comma and point, spaces and thin gaps; guesses at nothing', () => {
    expect(['0,25', '0.25', ' 1 568,5', '1\u2009568.5', '12.', '.5'].map(readDecimal)).toEqual([
      0.25, 0.25, 1568.5, 1568.5, 12, 0.5,
    ])
    expect(['', 'abc', '1,000.5', '1.2.3', '5 g', 'Infinity', '0x10', '1e3'].map(readDecimal)).toEqual(
      Array.from({ length: 8 }, () => null),
    )
  })

  it('keeps a share exact in thousandths and refuses a fourth decimal', () => {
    expect(readScaled('2,405', 3)).toBe(2405)
    expect(readScaled('0.1230', 3)).toBe(123)
    expect(readScaled('0.1234', 3)).toBeNull()
    fc.assert(fc.property(fc.integer({ min: 0, max: 100_000 }), (n) => readScaled(percentText(n), 3) === n))
  })

  it('groups thousands with a thin gap', () => {
    expect(grouped(1568, 1)).toBe('1\u2009568.0')
    expect(grouped(-0.13, 2)).toBe('\u22120.13')
  })
})

const line = (
  percent: number,
  density: number,
  isInternal: boolean,
  priceCentsPerKg: number | null = null,
) => ({
  percentThousandths: Math.round(percent * 1000),
  density,
  isInternal,
  priceCentsPerKg,
})

describe('totals', () => {
  it('add up exactly where floating point would not', () => {
    const totals = formulaTotals(Array.from({ length: 10 }, () => line(10, 1, false)))
    expect(totals.totalThousandths).toBe(100_000)
    // 0.1 + 0.2 in floating point is 0.30000000000000004
    expect(formulaTotals([line(0.1, 1, true), line(0.2, 1, true)]).missingThousandths).toBe(99_700)
  })

  it('cost is the weighted price, and lines without one are counted', () => {
    const totals = formulaTotals([line(10, 1, false, 1850), line(80, 1, true, 2), line(10, 1, true)])
    // 0.1 kg at 18.50 and 0.8 kg at 0.02
    expect(totals.costCentsPerKg).toBe(187)
    expect(totals.linesWithoutPrice).toBe(1)
    expect(formulaTotals([]).costCentsPerKg).toBeNull()
  })

  it('a phase has its share by volume', () => {
    const phases = phaseTotals([
      { ...line(20, 0.8, false), phase: 'A' },
      { ...line(80, 1, true), phase: 'B' },
    ])
    expect(phases.map((phase) => phase.phase)).toEqual(['A', 'B'])
    expect(phases[0]?.volumePercent).toBeCloseTo(100 * (25 / 105), 6)
  })

  it('the remainder makes up 100 % and is never below 0', () => {
    expect(remainderThousandths([line(14, 1, false), line(0.35, 1, true)])).toBe(85_650)
    expect(remainderThousandths([line(100, 1, false), line(5, 1, true)])).toBe(0)
  })
})

describe('the finding', () => {
  it('says how much is inside, what is missing, and where packing ends', () => {
    const totals = formulaTotals([line(13, 0.9, false), line(86, 1, true)])
    const finding = formulaFinding('water-in-oil', totals, [])
    expect(`${finding.strong}${finding.rest}`).toBe('85.6 % water inside, past the closest packing')
    expect(finding.sentence).toContain('total 99.00 %, 1.00 % missing')
    const lotion = formulaFinding(
      'oil-in-water',
      formulaTotals([line(20, 0.9, true), line(85, 1, false)]),
      [],
    )
    expect(lotion.rest).toContain('oil inside')
    expect(lotion.sentence).toContain('5.00 % too much')
    expect(formulaFinding('water-in-oil', formulaTotals([]), []).strong).toBe('Nothing')
  })
})
