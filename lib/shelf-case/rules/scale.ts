import { slopeFromScale, type ShelfLifeScale } from '@/lib/science/shelf-life-scale'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'

/** How a frozen case says what its regression was fitted on. */
export const scaleWords: Record<ShelfLifeScale, string> = {
  'log share': 'natural logarithm of the share of each batch’s own initial',
  difference: 'difference from each batch’s own initial',
  'log reading': 'natural logarithm of the reading',
  reading: 'the reading',
}

export function scaleOf(words: string): ShelfLifeScale {
  const found = Object.entries(scaleWords).find(([, text]) => text === words)
  return (found?.[0] ?? 'reading') as ShelfLifeScale
}

/** The fit that decides, or the first where one line serves all. */
export function decidingFit(a: AttributeEvidence) {
  const out = a.calc?.output
  return out?.batches.find((b) => b.name === out.limitingBatch) ?? out?.batches[0]
}

/** What the deciding line moves by in a month, with its sign: in percent where logarithms were fitted. */
export function slopeText(a: AttributeEvidence): string {
  const slope = decidingFit(a)?.slope
  if (slope === undefined) return ''
  const scale = scaleOf(a.scale)
  const change = slopeFromScale(scale, slope)
  const isPercent = scale === 'log share' || scale === 'log reading'
  const text = Math.abs(change).toFixed(isPercent ? 2 : 3)
  return `${change < 0 ? '\u2212' : '+'}${text}${isPercent ? ' %' : ''}`
}

/** The p of a poolability test as page and report print it; empty where no regression was made. */
export function testText(a: AttributeEvidence, name: 'slopes' | 'intercepts'): string {
  const out = a.calc?.output
  if (!out) return ''
  const test = out.tests.find((t) => t.name === name)
  if (!test) return out.batches.length > 1 ? 'not asked' : 'one batch'
  return test.p === null ? 'not known' : test.p < 0.001 ? 'under 0.001' : test.p.toFixed(3)
}

export function crossingText(a: AttributeEvidence): string {
  if (a.basis === 'observed') return ''
  return a.crossingMonths === null ? 'past 60' : a.crossingMonths.toFixed(1)
}
