import { describe, expect, it } from 'vitest'
import { findTopic } from '@/lib/science/calc/topics'
import { fUpperTail, tQuantile, tUpperTail } from '@/lib/science/distributions'
import { expectDigits, expectFigures, reference } from './reference'

/** Figures that R made; each JSON file names its script, which stands beside it. */
type Made = { name: string; input: unknown; output: Record<string, unknown> }

const regressions = reference<{ sets: Made[] }>('regression-r').sets
const shelfLives = reference<{ sets: Made[] }>('shelf-life-r').sets
const curves = reference<{ sets: Made[] }>('separation-curve-r').sets
const series = reference<{ trends: Made[]; days: Made[] }>('drift-r')
const measures =
  reference<Record<'arrhenius' | 'mkt' | 'phSlope' | 'outlier' | 'droplets', Made[]>>('measures-r')

/** Digits are those in which two ways of adding up the same doubles agree. */
describe.each([
  ['regression', 'lm and predict.lm', 10, regressions],
  ['shelf-life', 'lm, anova, predict.lm and uniroot', 10, shelfLives],
  ['separation-curve', 'nls', 9, curves],
  ['drift', 'lm, pt, qt and uniroot', 10, series.trends],
  ['instrument-day', 'lm and predict.lm', 10, series.days],
  ['arrhenius', 'lm, predict.lm and anova', 10, measures.arrhenius],
  ['mkt', 'weighted.mean', 12, measures.mkt],
  ['ph-slope', 'lm', 10, measures.phSlope],
  ['outlier', 'qt and sd', 10, measures.outlier],
  ['droplets', 'sums and approx', 12, measures.droplets],
] as const)('%s as by %s of R 4.2.2', (name, _, digits, sets) => {
  it.each(sets.map((set) => [set.name, set] as const))('%s', async (_name, { input, output }) => {
    const topic = (await findTopic(name))!
    expectFigures(topic.run(input), output, digits)
  })
})

describe('distributions as by R 4.2.2', () => {
  type Tables = {
    tTails: { t: number; df: number; upper: number }[]
    fTails: { F: number; df1: number; df2: number; upper: number }[]
    tQuantiles: { p: number; df: number; t: number }[]
  }
  const { tTails, fTails, tQuantiles } = reference<Tables>('distributions-r')

  it('pt, far out too', () => {
    for (const { t, df, upper } of tTails) expectDigits(tUpperTail(t, df), upper, 11)
  })

  it('pf, far out too', () => {
    for (const { F, df1, df2, upper } of fTails) expectDigits(fUpperTail(F, df1, df2), upper, 11)
  })

  it('qt', () => {
    for (const { p, df, t } of tQuantiles) expectDigits(tQuantile(p, df), t, 10)
  })
})

it('every figure names the script that made it', () => {
  for (const name of [
    'regression-r',
    'shelf-life-r',
    'separation-curve-r',
    'drift-r',
    'measures-r',
    'distributions-r',
  ]) {
    expect(reference<{ source: string }>(name).source).toMatch(
      new RegExp(`^R 4\\.\\d+\\.\\d+, ${name}\\.R: `),
    )
  }
})
