import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { comparisonFinding, placeText, shelvesOf, type ComparedSeries } from '@/lib/formula/rules/comparison'
import { formulaTotals } from '@/lib/formula/rules/totals'
import {
  familyGrid,
  gridOf,
  memberLines,
  proposeCodes,
  proposeName,
  readLevels,
  remainderWith,
} from '@/lib/formula/rules/variants'

describe('levels as they are typed', () => {
  it('reads commas and points, with semicolons, gaps or a comma and a gap between', () => {
    expect(readLevels('0.2; 0,3 0.4 %').levels).toEqual([200, 300, 400])
    expect(readLevels('1, 2, 3').levels).toEqual([1000, 2000, 3000])
    expect(readLevels('').levels).toEqual([])
  })
  it('says which one is none, and that each stands once', () => {
    expect(readLevels('0.2; much').error).toContain('much is no share')
    expect(readLevels('101').error).toContain('101 is no share')
    expect(readLevels('-1').error).toContain('-1 is no share')
    expect(readLevels('0.2; 0.20').error).toContain('0.20 stands twice')
  })
})

const line = (id: string, percentThousandths: number, isRemainder = false) => ({
  ...{ id, inciName: id, percentThousandths, isRemainder },
  ...{ density: 1, isInternal: false, priceCentsPerKg: null },
})
const lines = [line('gum', 200), line('salt', 700), line('oil', 14_000), line('water', 85_100, true)]

describe('a member of a family', () => {
  it('is balanced to exactly 100 by the q.s. line, at any levels that fit', () => {
    const levels = fc.integer({ min: 0, max: 42_000 })
    fc.assert(
      fc.property(levels, levels, (gum, salt) => {
        const shares = new Map([
          ['gum', gum],
          ['salt', salt],
        ])
        const left = remainderWith(lines, shares)!
        expect(left).toBe(100_000 - 14_000 - gum - salt)
        expect(formulaTotals(memberLines(lines, shares)).totalThousandths).toBe(
          left < 0 ? 14_000 + gum + salt : 100_000,
        )
      }),
    )
  })
  it('cannot be balanced without such a line', () => {
    expect(remainderWith(lines.slice(0, 3), new Map())).toBeNull()
  })
})

describe('the grid', () => {
  it('is every level with every level', () => {
    expect(
      gridOf([
        [1, 2, 3],
        [7, 8],
      ]),
    ).toEqual([
      [1, 7],
      [1, 8],
      [2, 7],
      [2, 8],
      [3, 7],
      [3, 8],
    ])
    expect(gridOf([[1, 2]])).toEqual([[1], [2]])
  })
  it('shows each member at its levels', () => {
    const level = (inciName: string, percentThousandths: number) => ({
      phase: 'B',
      inciName,
      percentThousandths,
    })
    const members = gridOf([
      [200, 300],
      [700, 900],
    ]).map(([gum, salt], index) => ({
      code: `N${'abcd'[index]}`,
      levels: [level('Xanthan Gum', gum!), level('Magnesium Sulfate', salt!)],
    }))
    expect(familyGrid(members)).toEqual({
      ...{ rowName: 'Xanthan Gum', columnName: 'Magnesium Sulfate', columns: [700, 900] },
      rows: [
        { level: 200, codes: [['Na'], ['Nb']] },
        { level: 300, codes: [['Nc'], ['Nd']] },
      ],
    })
    const one = members.slice(0, 1).map((member) => ({ ...member, levels: member.levels.slice(0, 1) }))
    expect(familyGrid(one)).toMatchObject({ columnName: null, columns: [null], rows: [{ codes: [['Na']] }] })
    expect(familyGrid([])).toBeNull()
  })
})

describe('proposed codes and names', () => {
  it('are letters and digits, at most 20 signs, and none that is taken', () => {
    expect(proposeCodes('N86', 3, ['n86B'])).toEqual(['N86a', 'N86c', 'N86d'])
    expect(proposeCodes('N86a', 2, ['N86a1'])).toEqual(['N86a2', 'N86a3'])
    const base = fc.stringMatching(/^[A-Za-z0-9]{1,20}$/)
    fc.assert(
      fc.property(base, fc.integer({ min: 1, max: 12 }), (code, count) => {
        const codes = proposeCodes(code, count, [code])
        return new Set(codes).size === count && codes.every((one) => /^[A-Za-z0-9]{1,20}$/.test(one))
      }),
    )
  })
  it('name the levels and stay within 120 signs', () => {
    const levels = [{ inciName: 'Xanthan Gum', percentThousandths: 300 }]
    expect(proposeName('silicone-free cream', levels)).toBe('silicone-free cream, Xanthan Gum 0.30 %')
    expect(proposeName('x'.repeat(120), levels)).toMatch(/^x+, Xanthan Gum 0\.30 %$/)
    expect(proposeName('x'.repeat(120), levels).length).toBeLessThanOrEqual(120)
  })
})

const series = (formulaId: string, more: Partial<ComparedSeries>): ComparedSeries => ({
  ...{ formulaId, studyCode: 'S-1', batchId: 'b', batchCode: `${formulaId}-1`, studyStationId: 's' },
  ...{ kind: 'temperature', temperatureC: 45, voice: 'decides', attribute: 'separation', standing: 'steady' },
  ...{ outSinceWeeks: null, leavesAtWeeks: null, latestWeeks: 8 },
  ...{ timePoints: [1, 2, 4, 8], endWeeks: 12 },
  ...more,
})
const formulas = ['N1', 'N2', 'N3'].map((code) => ({ id: code, code }))

describe('where prototypes stand', () => {
  const found = [
    series('N1', { standing: 'out', outSinceWeeks: 5.2 }),
    series('N1', { standing: 'steady', batchCode: 'N1-2' }),
    series('N1', { temperatureC: 25 }),
    series('N2', { attribute: 'ph', standing: 'leaning', leavesAtWeeks: 14 }),
    series('N3', {}),
    series('N3', { kind: 'freeze-thaw', temperatureC: null }),
    series('N1', { kind: 'freeze-thaw', temperatureC: null, standing: 'out', outSinceWeeks: 2.1 }),
  ]

  it('are shelves from the hottest down, each place the worst of its batches', () => {
    const shelves = shelvesOf(['N1', 'N2', 'N3'], found)
    expect(shelves.map((shelf) => shelf.key)).toEqual(['45', '25', 'freeze-thaw'])
    const [ph, separation] = shelves[0]!.rows.toSorted((a, b) => a.attribute.localeCompare(b.attribute))
    expect(ph?.places.map((place) => place?.series.standing ?? null)).toEqual([null, 'leaning', null])
    expect(separation?.places.map((place) => place?.series.standing ?? null)).toEqual(['out', null, 'steady'])
    expect(separation?.places[0]?.others).toBe(1)
    expect(placeText(separation!.places[0]!)).toBe('week 5')
    expect(placeText(ph!.places[1]!)).toBe('out week 14')
    expect(placeText(separation!.places[2]!)).toBe('to week 8')
  })

  it('give the finding: who stands everywhere, and who is out from when', () => {
    const finding = comparisonFinding(formulas, found)
    expect(`${finding.strong}${finding.rest}`).toBe('N3 stands everywhere so far')
    expect(finding.sentence).toBe(
      'Out: N1 at 45 °C from week 5 and in freeze-thaw from cycle 2. Leaning: N2.',
    )
    expect(comparisonFinding(formulas.slice(0, 1), found).rest).toBe(' is out somewhere')
    expect(comparisonFinding(formulas, []).strong).toBe('Too early')
    expect(comparisonFinding([], []).sentence).toContain('Pick formulas')
  })
})
