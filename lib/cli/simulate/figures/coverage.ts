import { shelfLife } from '../../../science/shelf-life'
import type { Figure } from './figure'

/** Months of a long-term plan [std: ICH Q1A(R2)]. */
const months = [0, 3, 6, 9, 12, 18, 24]

/** A batch falls by 0.2 a month from 100 and meets 95 after 25 months; the bound should come first in 95 of 100. */
export function coverage(name: string, studies: number): Figure {
  const slope = -0.2
  const limit = 95
  const truth = (limit - 100) / slope
  return {
    name,
    studies,
    study: (chance, count) => {
      const y = months.map((t) => 100 + slope * t + chance.normal())
      const { crossing } = shelfLife({
        batches: [{ name: 'batch', t: months, y }],
        limit: { lower: limit },
        direction: 'decreasing',
        horizon: 1000,
      })
      count('batches')
      if (crossing !== null && crossing <= truth) count('covered')
    },
  }
}
