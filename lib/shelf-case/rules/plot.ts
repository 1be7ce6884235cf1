import { attributeOf } from '@/lib/reading/schema/attributes'
import { shownValue } from '@/lib/study/rules/words'
import { shelfLifeLines } from '@/lib/science/shelf-life-lines'
import { fromScale } from '@/lib/science/shelf-life-scale'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'
import { scaleOf } from '@/lib/shelf-case/rules/scale'

export type RegressionView = {
  unit: string
  lower: number | null
  upper: number | null
  /** A value of the axis as it is written. */
  label: (y: number) => string
  batches: { name: string; t: number[]; y: number[]; line: Sample[]; bound: Sample[] }[]
}
type Sample = { t: number; y: number }

/**
 * The frozen regression in the unit shown: the lines and the bound of the one that decides, from the
 * case's own observations, taken back from the scale on which they were fitted.
 */
export function regressionView(evidence: AttributeEvidence, upTo: number): RegressionView | null {
  if (!evidence.calc) return null
  const { input, output } = evidence.calc
  const scale = scaleOf(evidence.scale)
  const back = (y: number) => fromScale(scale, y)
  const at = Array.from({ length: 61 }, (_, i) => (i * upTo) / 60)
  const lines = shelfLifeLines(input, at)
  const deciding = output.limitingBatch ?? input.batches[0]?.name
  const samples = (values: number[] | undefined) =>
    (values ?? []).map((y, i): Sample => ({ t: at[i] ?? 0, y: back(y) }))
  const label = (y: number) =>
    scale === 'log share' ? y.toFixed(0) : shownValue(attributeOf(evidence.attribute, evidence), y)
  return {
    label,
    unit: scale === 'log share' ? '% of each batch’s own initial' : evidence.unit,
    lower: input.limit.lower === undefined ? null : back(input.limit.lower),
    upper: input.limit.upper === undefined ? null : back(input.limit.upper),
    batches: input.batches.map((b) => {
      const side = output.batches.find((x) => x.name === b.name)?.side
      const line = lines.find((x) => x.name === b.name)
      return {
        name: b.name,
        t: [...b.t],
        y: b.y.map(back),
        line: samples(line?.mean),
        bound: side && b.name === deciding ? samples(line?.[side]) : [],
      }
    }),
  }
}
