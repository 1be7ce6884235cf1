import { Matrix, QrDecomposition } from 'ml-matrix'
import { assertComputable, assertNumbers, ScienceError } from './guard'

export type LeastSquares = {
  coefficients: number[]
  standardErrors: number[]
  residualSd: number
  df: number
}

/**
 * General linear least squares by QR of the column-scaled design, with one step of refinement (checked against NIST
 * StRD Pontius and Longley). `design` holds one row an observation; put a column of ones in for an intercept.
 */
export function leastSquares(design: readonly (readonly number[])[], y: readonly number[]): LeastSquares {
  const columns = design[0]?.length ?? 0
  design.forEach((row, i) => assertNumbers(`design[${i}]`, row, columns))
  assertNumbers('y', y, columns + 1)
  if (design.length !== y.length)
    throw new ScienceError('y', `has ${y.length} values for ${design.length} rows`)

  const scales = Array.from({ length: columns }, (_, j) => norm(design.map((row) => row[j]!)))
  if (scales.some((scale) => scale === 0)) throw new ScienceError('design', 'has a column of zeros')
  const scaled = new Matrix(design.map((row) => row.map((value, j) => value / scales[j]!)))
  const qr = new QrDecomposition(scaled)
  if (!qr.isFullRank()) throw new ScienceError('design', 'has columns that depend on each other')
  const target = Matrix.columnVector([...y])
  const first = qr.solve(target)
  const solution = Matrix.add(first, qr.solve(Matrix.sub(target, scaled.mmul(first))))

  const df = y.length - columns
  const residuals = Matrix.sub(target, scaled.mmul(solution)).to1DArray()
  const residualSd = Math.sqrt(residuals.reduce((sum, r) => sum + r * r, 0) / df)
  const inverse = upperInverse(qr.upperTriangularMatrix)
  return assertComputable('design', {
    coefficients: scales.map((scale, j) => solution.get(j, 0) / scale),
    standardErrors: scales.map((scale, j) => (residualSd * Math.hypot(...inverse[j]!)) / scale),
    residualSd,
    df,
  })
}

/** Length of a vector of any number of entries, neither overflowing nor vanishing. */
function norm(values: readonly number[]): number {
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  return largest === 0
    ? 0
    : largest * Math.sqrt(values.reduce((sum, value) => sum + (value / largest) ** 2, 0))
}

/** Inverse of an upper triangular matrix; its row norms are √ of the diagonal of (X'X)⁻¹. */
function upperInverse(upper: Matrix): number[][] {
  const n = upper.columns
  const inverse = Array.from({ length: n }, () => new Array<number>(n).fill(0))
  for (let j = 0; j < n; j++) {
    for (let i = j; i >= 0; i--) {
      let sum = i === j ? 1 : 0
      for (let k = i + 1; k <= j; k++) sum -= upper.get(i, k) * inverse[k]![j]!
      inverse[i]![j] = sum / upper.get(i, i)
    }
  }
  return inverse
}
