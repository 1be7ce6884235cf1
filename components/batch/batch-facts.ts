import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { toleranceGrams, weighed } from '@/lib/batch/rules/weighing'
import { weighingMethod, yieldMethod } from '@/lib/science/methods/making'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import { percentOf } from '@/lib/science/percent'

type Line = BatchPage['weighings'][number]

export function weighingFacts(line: Line, actualG: number, tolerancePercent: number): FigureFacts {
  const { differencePercent, differenceG } = weighed(line.targetG, actualG, tolerancePercent)
  return factsOf(weighingMethod, {
    name: `${line.inciName}, off by`,
    result: differencePercent === null ? exactly(differenceG, 'g') : exactly(differencePercent, '%'),
    values: {
      percent: line.percentThousandths / 1000,
      targetG: line.targetG,
      actualG,
      allowedG: toleranceGrams(line.targetG, tolerancePercent),
    },
  })
}

export function yieldFacts(yieldG: number, weighedG: number): FigureFacts {
  return factsOf(yieldMethod, {
    result: exactly(percentOf(yieldG, weighedG), '%'),
    values: { yieldG, weighedG },
  })
}
