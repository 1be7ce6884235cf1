import { separationCurve } from '../separation-curve'
import { examples } from './examples'
import { fieldsOf, given, numbers, optionalNumber } from './read'
import { topic } from './topic'

export const separationCurveTopic = topic({
  name: 'separation-curve',
  says: 'When separation begins, how fast, and where it settles',
  input: '{t:[], percent:[], detectPercent?:1}',
  output: '{onset, rate, plateau, residualSd, model:"none"|"linear"|"first order after a lag"}',
  notes:
    'Nothing above detectPercent; or a straight line from where it begins; or S∞(1 − e^(−k(t − t₀))) after a lag, where that fits significantly better (F test at 0.05, from five times on).',
  example: examples['separation-curve'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['t', 'percent', 'detectPercent'])
    return {
      t: numbers(fields, 't'),
      percent: numbers(fields, 'percent'),
      ...given({ detectPercent: optionalNumber(fields, 'detectPercent') }),
    }
  },
  compute: separationCurve,
})
