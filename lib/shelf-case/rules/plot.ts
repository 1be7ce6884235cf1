import { tQuantile } from '@/lib/science/distributions'
import { boundAt } from '@/lib/science/meeting'
import { fitPooling } from '@/lib/science/pooling'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'

export type RegressionView = {
  unit: string
  lower: number | null
  upper: number | null
  batches: { name: string; t: number[]; y: number[]; line: Sample[]; bound: Sample[] }[]
}
type Sample = { t: number; y: number }

/**
 * The frozen regression in the unit shown: lines from the case's own slopes and intercepts, taken back from
 * logarithms, and the bound of the line that decides, from the same observations at the same confidence.
 */
export function regressionView(evidence: AttributeEvidence, upTo: number): RegressionView | null {
  if (!evidence.calc) return null
  const { input, output } = evidence.calc
  const isShare = evidence.scale.includes('share')
  const isLog = evidence.scale.includes('logarithm')
  const back = (y: number) => (isLog ? Math.exp(y) * (isShare ? 100 : 1) : y)
  const at = Array.from({ length: 61 }, (_, i) => (i * upTo) / 60)
  const { lines, residualSd, df } = fitPooling(input.batches, input.poolingAlpha ?? 0.25)
  const confidence = input.confidence ?? 0.95
  const quantile = tQuantile(input.direction === 'either' ? 1 - (1 - confidence) / 2 : confidence, df)
  const deciding = output.limitingBatch ?? input.batches[0]?.name
  return {
    unit: isShare ? '% of each batch’s own initial' : evidence.unit,
    lower: input.limit.lower === undefined ? null : back(input.limit.lower),
    upper: input.limit.upper === undefined ? null : back(input.limit.upper),
    batches: input.batches.map((b) => {
      const fit = output.batches.find((x) => x.name === b.name)
      const line = lines.find((x) => x.name === b.name)
      const sign = fit?.side === 'upper' ? 1 : -1
      return {
        name: b.name,
        t: [...b.t],
        y: b.y.map(back),
        line: at.map((t) => ({ t, y: back((fit?.intercept ?? 0) + (fit?.slope ?? 0) * t) })),
        bound:
          line && fit?.side && b.name === deciding
            ? at.map((t) => ({
                t,
                y: back(boundAt({ ...line.line, width: quantile * residualSd }, sign, t)),
              }))
            : [],
      }
    }),
  }
}
