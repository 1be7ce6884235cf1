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
    'onset, rate and plateau are null where there is none. rate is in points per unit of t when separation begins; onset is the first lasting crossing of detectPercent, interpolated.',
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
