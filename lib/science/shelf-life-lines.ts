import { boundAt } from './meeting'
import { fitPooling } from './pooling'
import { boundQuantile, type ShelfLifeInput } from './shelf-life'

export type ShelfLifeLine = {
  name: string
  /** The fitted mean and its confidence bounds at the times asked for. */
  mean: number[]
  lower: number[]
  upper: number[]
}

/**
 * The lines and bounds whose crossings `shelfLife` answers with, at given times, for drawing: the same pooling, the
 * same quantile, one line a batch.
 */
export function shelfLifeLines(input: ShelfLifeInput, times: readonly number[]): ShelfLifeLine[] {
  const { batches, direction, confidence = 0.95, poolingAlpha = 0.25 } = input
  const { lines, residualSd, df } = fitPooling(batches, poolingAlpha)
  const quantile = boundQuantile(direction, confidence, df)
  return lines.map(({ name, line, intercept }) => {
    const bounded = { ...line, width: quantile * residualSd }
    return {
      name,
      mean: times.map((t) => intercept + line.slope * t),
      lower: times.map((t) => boundAt(bounded, -1, t)),
      upper: times.map((t) => boundAt(bounded, 1, t)),
    }
  })
}
