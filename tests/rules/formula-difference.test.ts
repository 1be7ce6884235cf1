import { describe, expect, it } from 'vitest'
import { difference, differenceFinding } from '@/lib/formula/rules/difference'

const line = (inciName: string, percent: number, more: object = {}) => ({
  ...{ phase: 'A', ingredientId: null, inciName, function: '', density: 1, isInternal: false },
  ...{ percentThousandths: Math.round(percent * 1000), isRemainder: false, priceCentsPerKg: null },
  ...more,
})
const step = (instruction: string, more: object = {}) => ({
  ...{ phase: '', instruction, speedRpm: null, minutes: null, temperatureC: null, lookFor: '', caution: '' },
  ...more,
})
const side = (lines: ReturnType<typeof line>[], steps: ReturnType<typeof step>[] = []) => ({
  ...{ emulsionType: 'water-in-oil' as const, targetPh: null },
  ...{ lines, steps },
})
const inside = { phase: 'B', isInternal: true }
const told = (rows: { mark: string; from: object | null; to: object | null }[]) =>
  rows.map(({ mark, from, to }) => {
    const row = (to ?? from) as { inciName?: string; instruction?: string }
    return `${mark} ${row.inciName ?? row.instruction}`
  })

describe('the difference of two versions', () => {
  const one = side([
    line('Squalane', 14, { density: 0.8, priceCentsPerKg: 2000 }),
    line('Beeswax', 1),
    line('Aqua', 85, { ...inside, isRemainder: true }),
  ])
  const two = side([
    line('SQUALANE', 12, { density: 0.8, priceCentsPerKg: 2000 }),
    line('Aqua', 86.7, { ...inside, isRemainder: true }),
    line('Xanthan Gum', 1.3, inside),
  ])

  it('says what is gone where it stood, what changed and what is new', () => {
    const found = difference(one, two)
    expect(told(found.lines)).toEqual([
      'changed SQUALANE',
      'removed Beeswax',
      'changed Aqua',
      'added Xanthan Gum',
    ])
    expect(found.lines[0]?.fields).toEqual(['percentThousandths'])
    expect(found.counts).toEqual({ added: 1, removed: 1, changed: 2 })
  })

  it('says that the target pH moved, where no line did too', () => {
    const acid = { ...one, targetPh: { low: 4.5, high: 4.5 } }
    const wide = { ...one, targetPh: { low: 4.5, high: 5.5 } }
    const finding = differenceFinding(difference(acid, wide), 'water')
    expect(finding.strong).not.toBe('Nothing')
    expect(finding.sentence).toContain('Target pH 4.50 to 5.50, it was 4.50.')
    expect(differenceFinding(difference(wide, wide), 'water').strong).toBe('Nothing')
  })

  it('computes what follows for both: total, inside by mass and volume, oil to water, cost', () => {
    const { from, to } = difference(one, two)
    // 85 of 14/0.8 + 1 + 85 mL; 88 of 12/0.8 + 88 mL.
    expect(from.internalVolumePercent).toBeCloseTo((100 * 85) / 103.5, 6)
    expect(to.internalVolumePercent).toBeCloseTo((100 * 88) / 103, 6)
    expect([from.internalMassPercent, to.internalMassPercent]).toEqual([85, 88])
    expect([from.oilThousandths, to.oilThousandths]).toEqual([15_000, 12_000])
    expect([from.costCentsPerKg, to.costCentsPerKg]).toEqual([280, 240])
    expect(to.totalThousandths).toBe(100_000)
  })

  it('is nothing for the same version, whatever the order of the lines', () => {
    const turned = { ...one, lines: one.lines.toReversed() }
    expect(difference(one, turned).counts).toEqual({ added: 0, removed: 0, changed: 0 })
    expect(difference(side([]), side([])).lines).toEqual([])
  })

  it('turned round, added and removed change places', () => {
    const back = difference(two, one).counts
    expect(back).toEqual({ added: 1, removed: 1, changed: 2 })
  })

  it('pairs an ingredient that stands in two phases with itself in the same phase', () => {
    const before = side([line('Aqua', 10), line('Aqua', 70, inside)])
    const after = side([line('Aqua', 65, inside), line('Aqua', 10)])
    const found = difference(before, after).lines
    expect(found.map((row) => [row.mark, row.fields])).toEqual([
      ['changed', ['percentThousandths']],
      ['same', []],
    ])
  })

  it('says of a line that went into another phase that it did', () => {
    const found = difference(side([line('Glycerin', 5)]), side([line('Glycerin', 5, inside)])).lines
    expect(found[0]?.fields).toEqual(['phase', 'isInternal'])
  })

  it('pairs steps by their words, then in order', () => {
    const from = side([], [step('Melt A'), step('Cool'), step('B into A', { minutes: 20 }), step('Stir')])
    const to = side(
      [],
      [step('Melt A'), step('B into A', { minutes: 44 }), step('Stir gently'), step('Fill')],
    )
    const found = difference(from, to).steps
    expect(told(found)).toEqual([
      'same Melt A',
      'removed Cool',
      'changed B into A',
      'changed Stir gently',
      'added Fill',
    ])
    expect(found[2]?.fields).toEqual(['minutes'])
    expect(found[3]?.fields).toEqual(['instruction'])
  })
})
