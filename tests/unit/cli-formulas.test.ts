import { ESLint } from 'eslint'
import path from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'

describe('no second copy of a formula', () => {
  let eslint: ESLint
  beforeAll(async () => {
    eslint = new ESLint({ ruleFilter: ({ ruleId }) => ruleId === 'stillstand/formulas' })
    // The first text loads the configuration with all its plugins.
    await complaints('lib/jar/rules.ts', '')
  }, 60_000)

  async function complaints(file: string, code: string): Promise<string[]> {
    const [result] = await eslint.lintText(code, { filePath: path.resolve(file) })
    return result?.messages.map((message) => message.message) ?? []
  }

  const mean = 'export const m = values.reduce((sum, value) => sum + value, 0) / values.length'
  const refused: [what: string, file: string, code: string, complaint: string][] = [
    ['a second mean', 'lib/flag/rules.ts', mean, 'Call `mean` of lib/science/mean'],
    [
      'a mean in a loop',
      'components/jar/row.tsx',
      'let s = 0; for (const v of x) s += v; s /= 1; export default s / x.length',
      'Call `mean`',
    ],
    ['a mean in a chart', 'components/charts/curve.tsx', mean, 'Call `mean`'],
    ['a mean in a mark', 'components/marks/jar.ts', 'export const m = sum / values.length', 'Call `mean`'],
    [
      'a median by its middle',
      'components/flag/verdict.ts',
      'export const m = sorted[Math.floor(sorted.length / 2)]',
      'Call `median`',
    ],
    ['a mean by name', 'lib/study/rules.ts', 'export function median(x) { return x[1] }', 'second copy'],
    [
      'a fit by name',
      'components/charts/curve.tsx',
      'const linearFit = (x, y) => [x, y]; export default linearFit',
      'second copy',
    ],
    [
      'a log fit',
      'lib/shelf-case/rules/plot.ts',
      'export const y = values.map((v) => Math.log(v / first))',
      'root, power or logarithm',
    ],
    [
      'a log fit in a chart',
      'components/charts/curve.tsx',
      'export const y = values.map((v) => Math.log(v))',
      'root, power or logarithm',
    ],
    [
      'a slope taken back',
      'components/shelf-case/carry-table.tsx',
      'export const p = Math.expm1(slope)',
      'root, power or logarithm',
    ],
    [
      'a standard deviation',
      'lib/series/rules.ts',
      'export const sd = Math.sqrt(squares / (n - 1))',
      'root, power or logarithm',
    ],
    ['squares', 'lib/series/rules.ts', 'export const s = (v - centre) ** 2', 'power of data'],
    ['a share in percent', 'lib/study/rules.ts', 'export const p = (topMm / totalMm) * 100', '`percentOf`'],
    [
      'the same, put otherwise',
      'components/batch/x.tsx',
      'export const p = (100 * yieldG) / weighedG',
      '`percentOf`',
    ],
    [
      'a difference in percent',
      'lib/calibration/rules.ts',
      'export const p = (readMPas / fluidMPas - 1) * 100',
      '`percentOf`',
    ],
    ['kelvin', 'lib/station/rules.ts', 'export const k = celsius + 273.15', 'constant'],
    ['weeks of its own', 'lib/pull/rules.ts', 'export const w = ms / 604_800_000', 'constant'],
    ['weeks spelled out', 'lib/pull/rules.ts', 'export const w = 7 * 24 * 3600 * 1000', 'constant'],
    ['months of its own', 'components/charts/time.ts', 'export const w = 365.25 / 12 / 7', 'constant'],
    [
      'an average in SQL',
      'lib/study/queries.ts',
      'export const q = sql`select avg(temperature_c) from t`',
      'statistic in SQL',
    ],
    [
      'one with a type',
      'lib/study/queries.ts',
      'export const q = sql<number>`avg(temperature_c)`',
      'statistic in SQL',
    ],
    [
      'a regression in SQL',
      'lib/series/queries.ts',
      'export const q = sql`regr_slope(value, weeks)`',
      'statistic in SQL',
    ],
    [
      'a percentile in SQL',
      'lib/series/queries.ts',
      'export const q = sql`percentile_cont(0.5) within group (order by v)`',
      'statistic in SQL',
    ],
    [
      'a weighted sum in SQL',
      'lib/study/queries.ts',
      'export const q = sql`sum(fill_g / (1 - loss / 100))`',
      'statistic in SQL',
    ],
    [
      'an average by the builder',
      'lib/bench/queries.ts',
      "export const q = db.select(({ fn }) => fn.avg('r.value').as('v'))",
      'statistic in SQL',
    ],
    [
      'one by its name',
      'lib/bench/queries.ts',
      "export const q = db.select((eb) => eb.fn('stddev', ['r.value']))",
      'statistic in SQL',
    ],
  ]
  it.each(refused)('finds %s in %s', async (_, file, code, complaint) => {
    expect((await complaints(file, code)).join('\n')).toContain(complaint)
  })

  const allowed: [what: string, file: string, code: string][] = [
    ['the formulas themselves', 'lib/science/mean.ts', mean],
    [
      'a distance',
      'components/marks/place.ts',
      'export const d = Math.hypot(x, y) + Math.sqrt(area) + x ** 2',
    ],
    [
      'a round axis step',
      'components/charts/curve-geometry.ts',
      'export const p = 10 ** Math.floor(Math.log10(range / count))',
    ],
    ['a pitch', 'components/charts/emulsion-section.tsx', 'export const p = height / questions.length'],
    ['decimal places', 'lib/formula/rules.ts', 'export const t = Math.round(value * 10 ** places)'],
    [
      'a whole sum',
      'lib/formula/rules.ts',
      'export const t = lines.reduce((sum, line) => sum + line.thousandths, 0)',
    ],
    ['a unit', 'lib/formula/rules.ts', 'export const percent = thousandths / 1000'],
    ['a share that is shown', 'components/study/row.tsx', 'export const t = `${Math.round(used * 100)} %`'],
    ['a share that is taken', 'lib/batch/rules.ts', 'export const g = (targetG * tolerancePercent) / 100'],
    [
      'a count and a sum in SQL',
      'lib/batch/queries.ts',
      'export const q = sql`select count(*), sum(actual_g) from t`',
    ],
    ['half a text', 'lib/auth/password.ts', 'export const half = bare.slice(0, bare.length / 2)'],
    ['hours', 'lib/auth/token.ts', 'export const hours = { invitation: 7 * 24 }'],
    ['what the demo invents', 'lib/cli/seed/noise.ts', 'export const n = Math.sqrt(-2 * Math.log(u))'],
  ]
  it.each(allowed)('lets %s be in %s', async (_, file, code) => {
    expect(await complaints(file, code)).toEqual([])
  })
})
