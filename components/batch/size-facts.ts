import { exactly, factsOf, type FigureFacts, type Method } from '@/lib/science/methods/method'

const sizeMethod: Method = {
  name: 'Size of a batch',
  formula: [
    'Jars × fill ÷ (1 − loss in filling), for each protocol on this batch.',
    'Their sum ÷ (expected yield ÷ 100), rounded up to a gram.',
  ],
  inputs: [
    { key: 'neededG', says: 'grams that the jars take', unit: 'g' },
    { key: 'yieldPercent', says: 'expected yield', unit: '%' },
  ],
  sources: [
    { text: 'Arithmetic of what was typed', mark: 'handbook' },
    { text: 'The usual yield of 95 %', mark: 'practice' },
  ],
  topic: null,
}

export function sizeFacts(
  sizeG: number,
  neededG: number,
  yieldPercent: number,
  needs: readonly { name: string; jars: number; grams: number }[],
): FigureFacts {
  return factsOf(sizeMethod, {
    result: exactly(sizeG, 'g'),
    values: { neededG, yieldPercent },
    more: needs.map((need) => ({ says: `${need.name}, ${need.jars} jars`, value: exactly(need.grams, 'g') })),
  })
}
