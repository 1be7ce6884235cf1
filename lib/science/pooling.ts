import { fUpperTail } from './distributions'
import { assertNumbers, assertSameLength, ScienceError } from './guard'
import type { BoundedLine } from './meeting'
import { centredSums, residualSquares, type CentredSums } from './regression'

export type BatchData = { name: string; t: number[]; y: number[] }
export type ShelfLifeModel = 'common line' | 'common slope' | 'separate lines'

export type PoolingTest = {
  name: 'slopes' | 'intercepts'
  /** null, like p, where there is no residual variation. */
  F: number | null
  df1: number
  df2: number
  p: number | null
  pooled: boolean
}

export type PooledFit = {
  model: ShelfLifeModel
  tests: PoolingTest[]
  /** One line a batch, each with the sums its confidence bound needs; `width` is left to the caller. */
  lines: { name: string; intercept: number; line: Omit<BoundedLine, 'width'> }[]
  residualSd: number
  df: number
}

/**
 * Poolability of batches, ICH Q1E (2003) Appendix B: a line for each batch; slopes pooled where their F test has
 * p > alpha; then intercepts likewise, tested on the refitted common-slope model (its own mean square). With separate
 * lines every batch keeps slope and intercept and the error is pooled over batches [memory].
 */
export function fitPooling(batches: readonly BatchData[], alpha: number): PooledFit {
  assertBatches(batches)
  const parts = batches.map((batch) => ({ ...batch, sums: centredSums(batch.t, batch.y) }))
  const k = parts.length
  const total = parts.reduce((n, part) => n + part.t.length, 0)

  const common = commonLine(batches)
  if (k === 1) return { model: 'common line', tests: [], ...common }

  const separate = modelOf(
    parts,
    (part) => part.sums.xy / part.sums.xx,
    total - 2 * k,
    (part) => part.sums.xx,
  )
  if (separate.df < 1) {
    throw new ScienceError('batches', `hold ${total} values, too few for a line in each of ${k} batches`)
  }
  const sumXx = parts.reduce((sum, part) => sum + part.sums.xx, 0)
  const sharedSlope = parts.reduce((sum, part) => sum + part.sums.xy, 0) / sumXx
  const slope = modelOf(
    parts,
    () => sharedSlope,
    total - k - 1,
    () => sumXx,
  )

  const slopes = nestedTest('slopes', slope.squares, separate.squares, k - 1, separate.df, alpha)
  if (!slopes.pooled) return { model: 'separate lines', tests: [slopes], ...separate }
  const intercepts = nestedTest('intercepts', common.squares, slope.squares, k - 1, slope.df, alpha)
  const tests = [slopes, intercepts]
  return intercepts.pooled
    ? { model: 'common line', tests, ...common }
    : { model: 'common slope', tests, ...slope }
}

type Part = BatchData & { sums: CentredSums }
type Model = Pick<PooledFit, 'lines' | 'residualSd' | 'df'> & { squares: number }

function modelOf(
  parts: readonly Part[],
  slopeOf: (part: Part) => number,
  df: number,
  sumSquaresOf: (part: Part) => number,
): Model {
  let squares = 0
  const lines = parts.map((part) => {
    const slope = slopeOf(part)
    const { meanX, meanY } = part.sums
    squares += residualSquares(part.t, part.y, meanX, meanY, slope)
    return lineOf(part.name, meanX, meanY, slope, part.t.length, sumSquaresOf(part))
  })
  return { lines, squares, df, residualSd: df > 0 ? Math.sqrt(squares / df) : 0 }
}

function commonLine(batches: readonly BatchData[]): Model {
  const t = batches.flatMap((batch) => batch.t)
  const y = batches.flatMap((batch) => batch.y)
  const { meanX, meanY, xx, xy } = centredSums(t, y)
  const slope = xy / xx
  const squares = residualSquares(t, y, meanX, meanY, slope)
  const df = t.length - 2
  const lines = batches.map((batch) => lineOf(batch.name, meanX, meanY, slope, t.length, xx))
  return { lines, squares, df, residualSd: Math.sqrt(squares / df) }
}

function lineOf(name: string, meanX: number, meanY: number, slope: number, n: number, sumSquaresX: number) {
  return {
    name,
    intercept: meanY - slope * meanX,
    line: { centreX: meanX, centre: meanY, slope, n, sumSquaresX },
  }
}

function nestedTest(
  name: PoolingTest['name'],
  reduced: number,
  full: number,
  df1: number,
  df2: number,
  alpha: number,
): PoolingTest {
  // Without residual variation there is no F: equal lines pool, different ones do not.
  if (full === 0) return { name, F: null, df1, df2, p: null, pooled: reduced === 0 }
  const F = Math.max(0, (reduced - full) / df1 / (full / df2))
  const p = fUpperTail(F, df1, df2)
  return { name, F, df1, df2, p, pooled: p > alpha }
}

function assertBatches(batches: readonly BatchData[]): void {
  if (batches.length === 0) throw new ScienceError('batches', 'needs at least one batch')
  const names = new Set<string>()
  batches.forEach((batch, i) => {
    const at = `batches[${i}]`
    if (names.has(batch.name)) throw new ScienceError(`${at}.name`, `"${batch.name}" is used twice`)
    names.add(batch.name)
    assertNumbers(`${at}.t`, batch.t, batches.length === 1 ? 3 : 2)
    assertNumbers(`${at}.y`, batch.y, batches.length === 1 ? 3 : 2)
    assertSameLength(`${at}.t`, batch.t, `${at}.y`, batch.y)
    if (batch.t.every((time) => time === batch.t[0])) {
      throw new ScienceError(`${at}.t`, 'has no spread: all times are equal')
    }
  })
}
