import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { emptyLine, fillNumbers, grouped, moveLine, placeLine, placeRow } from '@/lib/formula/rules/arrange'
import { begin, record, redo, undo, type History } from '@/lib/formula/rules/history'
import { readPasted } from '@/lib/formula/rules/paste'
import { jarCents, oilAndWater } from '@/lib/formula/rules/totals'
import { findTwice, joinLines } from '@/lib/formula/rules/twice'
import type { TypedLine } from '@/lib/formula/rules/typed'

const linesOf = (text: string) => {
  const pasted = readPasted(text)
  if (pasted?.kind !== 'lines') throw new Error(`read as ${pasted?.kind ?? 'one cell'}`)
  return pasted.lines
}
const sentenceOf = (text: string) => {
  const pasted = readPasted(text)
  return pasted?.kind === 'refused' ? pasted.sentence : `not refused: ${pasted?.kind}`
}

describe('a pasted block', () => {
  it('reads tabs with decimal commas, a head row, phases and prices', () => {
    const text =
      'Phase\tINCI\tFunction\t%\tDensity\tPrice\r\nA\tSqualane\tlight oil\t12,40\t0,810\t21,00\r\nB\tAqua\twater\tq.s.\t0,998\t\r\n'
    expect(linesOf(text)).toMatchObject([
      {
        ...{ phase: 'A', inciName: 'Squalane', function: 'light oil' },
        ...{ percent: '12,40', density: '0,810', price: '21,00' },
      },
      { phase: 'B', inciName: 'Aqua', function: 'water', percent: '' },
    ])
  })

  it('goes by the words of the head row, whatever the order of the columns', () => {
    const text = 'Price/kg;% w/w;Ingredient;Supplier;Phase\n4,10;5,0 %;Isoamyl Laurate;Made up;A'
    expect(linesOf(text)).toMatchObject([
      { phase: 'A', inciName: 'Isoamyl Laurate', function: '', percent: '5,0', density: '', price: '4,10' },
    ])
  })

  it('reads commas, quoted cells with commas, quotes and line breaks, and names that hold a comma', () => {
    const text =
      '1,2-Hexanediol,humectant,2.0\n"Oil, refined",oil,5 %\n"Wax ""soft""\nbeads",thickens the oil,1.5'
    expect(linesOf(text)).toMatchObject([
      { inciName: '1,2-Hexanediol', function: 'humectant', percent: '2.0' },
      { inciName: 'Oil, refined', function: 'oil', percent: '5' },
      { inciName: 'Wax "soft" beads', function: 'thickens the oil', percent: '1.5' },
    ])
  })

  it('tells which rows it left out, and takes a sum for none of the lines', () => {
    const pasted = readPasted('Oil phase\t\nSqualane\t14\nTotal\t14')
    expect(pasted).toMatchObject({ kind: 'lines', leftOut: ['Oil phase', 'Total 14'] })
    expect(linesOf('Oil phase\t\nSqualane\t14\nTotal\t14')).toHaveLength(1)
  })

  it('takes a column of numbers for numbers, with decimal commas too', () => {
    expect(readPasted('12,40\n5,00 %\n0,3')).toEqual({
      kind: 'numbers',
      rows: [['12,40'], ['5,00'], ['0,3']],
    })
    expect(readPasted('12.4\t0.81\n5\t0.9')).toMatchObject({ kind: 'numbers' })
  })

  it('leaves one cell to the field it is pasted into', () => {
    for (const text of ['Squalane', '12,4', '', 'Squalane\toil']) expect(readPasted(text)).toBeNull()
  })

  it('refuses garbage, too many lines and ten thousand of them with a sentence', () => {
    expect(sentenceOf('lorem ipsum\ndolor sit\namet')).toContain('Nothing in what you pasted reads as a line')
    const rows = (count: number) => Array.from({ length: count }, (_, i) => `Oil ${i}\t0.1`).join('\n')
    expect(linesOf(rows(200))).toHaveLength(200)
    expect(sentenceOf(rows(201))).toContain('That are 201 lines, and a formula has at most 200')
    expect(sentenceOf(rows(10_000))).toContain('10\u2009000 rows')
    expect(sentenceOf('x'.repeat(2_000_000))).toContain('Nothing was changed')
  })

  it('never throws, whatever is on the clipboard', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), (text) => void readPasted(text)))
    const block = fc
      .array(fc.array(fc.constantFrom('A', '1,5', '"', 'q.s.', 'Aqua', '%', ' ', '')))
      .map((rows) => rows.map((row) => row.join('\t')).join('\n'))
    fc.assert(fc.property(block, (text) => void readPasted(text)))
  })
})

const line = (
  id: string,
  phase: string,
  inciName: string,
  percent: string,
  more: Partial<TypedLine> = {},
) => ({
  ...emptyLine(id, phase, phase === 'B'),
  ...{ inciName, percent },
  ...more,
})
const ids = (rows: readonly { id: string }[]) => rows.map((row) => row.id).join('')
const five = [
  line('a', 'A', 'Squalane', '10'),
  line('b', 'A', 'Tocopherol', '1'),
  line('c', 'B', 'Aqua', '', { isRemainder: true }),
  line('d', 'B', 'Glycerin', '5'),
  line('e', 'B', 'Aqua', '2'),
]

describe('numbers pasted into cells', () => {
  it('go right and down from the cell, and leave the q.s. line', () => {
    const filled = fillNumbers(five, 'b', 'percent', [['2', '0.95'], ['7'], ['6']])
    if (typeof filled === 'string') throw new Error(filled)
    expect(filled.map((one) => one.percent)).toEqual(['10', '2', '', '6', '2'])
    expect(filled[1]?.density).toBe('0.95')
  })

  it('are refused with a sentence below the last line and in a column of words', () => {
    expect(fillNumbers(five, 'd', 'percent', [['1'], ['2'], ['3']])).toContain(
      'only 2 lines stand from here on',
    )
    expect(fillNumbers(five, 'a', 'inci', [['1'], ['2']])).toContain('without names')
  })
})

describe('order', () => {
  it('a line that is dropped beside another takes its phase, and only moves', () => {
    const moved = grouped(placeLine(five, 'b', 'd', 'after'))
    expect(ids(moved)).toBe('acdbe')
    expect(moved.find((one) => one.id === 'b')).toMatchObject({ phase: 'B', isInternal: true })
    expect(ids(placeRow(five, 'e', 'a', 'before'))).toBe('eabcd')
    expect(ids(placeRow(five, 'e', 'gone', 'before'))).toBe('abcde')
    expect(ids(placeRow(five, 'c', 'c', 'after'))).toBe('abcde')
  })

  it('a line moved past the end of its phase goes over into the next', () => {
    expect(moveLine(five, 'b', 1)[1]).toMatchObject({ id: 'b', phase: 'B', isInternal: true })
  })
})

describe('undo and redo', () => {
  it('takes typing in one cell back at once, and cells apart', () => {
    const typed = ['1', '12', '12.5'].reduce((was, now) => record(was, now, 'a percent'), begin(''))
    const two = record(typed, '12.5 and more', 'b percent')
    expect(undo(two).now).toBe('12.5')
    expect(undo(undo(two)).now).toBe('')
    expect(undo(undo(undo(two))).now).toBe('')
    expect(redo(redo(redo(undo(undo(two))))).now).toBe('12.5 and more')
  })

  it('typing after a step back drops what was ahead', () => {
    const history = record(undo(record(begin('x'), 'y', null)), 'z', null)
    expect(redo(history).now).toBe('z')
    expect(undo(history).now).toBe('x')
  })

  it('redo after undo is where one was, after any changes', () => {
    const acts = fc.array(fc.record({ now: fc.integer(), at: fc.constantFrom(null, 'a', 'b') }), {
      maxLength: 40,
    })
    fc.assert(
      fc.property(acts, (changes) => {
        const whole = changes.reduce<History<number>>((was, { now, at }) => record(was, now, at), begin(0))
        let back = whole
        for (let i = 0; i < whole.past.length; i++) back = undo(back)
        let again = back
        for (let i = 0; i < whole.past.length; i++) again = redo(again)
        return back.now === (whole.past[0] ?? whole.now) && again.now === whole.now
      }),
    )
  })
})

describe('the same ingredient twice in a phase', () => {
  it('is found whatever its capitals and gaps, within a phase only', () => {
    expect(findTwice(five)).toEqual([{ phase: 'B', inciName: 'Aqua', ids: ['c', 'e'] }])
    expect(findTwice([line('a', 'A', 'Aqua', '1'), line('b', 'B', 'Aqua', '1')])).toEqual([])
    const spaced = [line('a', 'A', 'Cetyl  alcohol ', '1'), line('b', 'A', 'CETYL ALCOHOL', '1')]
    expect(findTwice(spaced)).toHaveLength(1)
  })

  it('joins them into one line with the sum, or the q.s. line, which makes up the rest itself', () => {
    const both = [line('a', 'A', 'Squalane', '10,25'), line('b', 'A', 'Squalane', '1.5')]
    expect(joinLines(both, ['a', 'b'])).toMatchObject([{ id: 'a', percent: '11.75' }])
    expect(joinLines(five, ['c', 'e'])).toHaveLength(4)
    expect(joinLines([line('a', 'A', 'Squalane', 'x'), both[1]!], ['a', 'b'])).toBeNull()
  })
})

describe('oil to water, and a jar', () => {
  const amounts = [
    { percentThousandths: 12_400, isInternal: false },
    { percentThousandths: 87_600, isInternal: true },
  ]
  it('goes by which phase is inside', () => {
    expect(oilAndWater('water-in-oil', amounts)).toEqual({ oilThousandths: 12_400, waterThousandths: 87_600 })
    expect(oilAndWater('oil-in-water', amounts)).toEqual({ oilThousandths: 87_600, waterThousandths: 12_400 })
  })
  it('50 g of what costs 1.51 per kg cost 7.55 cents', () => {
    expect(jarCents(151, 50)).toBeCloseTo(7.55, 10)
  })
})
