import { extrapolationCap } from '../extrapolation-cap'
import { outlier } from '../outlier'
import { regression } from '../regression'
import { shelfLife } from '../shelf-life'
import {
  choice,
  fieldsOf,
  flag,
  given,
  list,
  number,
  numbers,
  object,
  optionalFlag,
  optionalNumber,
  optionalNumbers,
  text,
} from './read'
import { topic } from './topic'
import { examples } from './examples'

export const regressionTopic = topic({
  name: 'regression',
  says: 'Least-squares line of y on x, with predictions',
  input: '{x:[], y:[], confidence?:0.95, at?:[x…]}',
  output:
    '{n, slope, intercept, slopeSe, interceptSe, residualSd, r2, df, slopeP, predictions:[{x, mean, meanLow, meanHigh, newLow, newHigh}]}',
  notes: 'Ordinary least squares, centred; checked against NIST StRD Norris. All limits are two-sided.',
  example: examples.regression,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['x', 'y', 'confidence', 'at'])
    return {
      x: numbers(fields, 'x'),
      y: numbers(fields, 'y'),
      ...given({ confidence: optionalNumber(fields, 'confidence'), at: optionalNumbers(fields, 'at') }),
    }
  },
  compute: regression,
})

export const shelfLifeTopic = topic({
  name: 'shelf-life',
  says: 'Supported time of one or more batches by ICH Q1E (2003)',
  input:
    '{batches:[{name, t:[], y:[]}], limit:{lower?, upper?}, direction:"decreasing"|"increasing"|"either", confidence?:0.95, poolingAlpha?:0.25, horizon}',
  output:
    '{model:"common line"|"common slope"|"separate lines", tests:[{name:"slopes"|"intercepts", F, df1, df2, p, pooled}], batches:[{name, slope, intercept, residualSd, df, crossing, side}], crossing, limitingBatch}',
  notes:
    'Slopes are pooled by an F test, then intercepts by one on the refitted common-slope model; with separate lines the error is pooled over batches. The crossing is in closed form.',
  example: examples['shelf-life'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', [
      'batches',
      'limit',
      'direction',
      'confidence',
      'poolingAlpha',
      'horizon',
    ])
    const limit = object(fields, 'limit', ['lower', 'upper'])
    return {
      batches: list(fields, 'batches', (item, path) => {
        const batch = fieldsOf(item, path, ['name', 't', 'y'])
        return { name: text(batch, 'name'), t: numbers(batch, 't'), y: numbers(batch, 'y') }
      }),
      limit: given({ lower: optionalNumber(limit, 'lower'), upper: optionalNumber(limit, 'upper') }),
      direction: choice(fields, 'direction', ['decreasing', 'increasing', 'either']),
      ...given({
        confidence: optionalNumber(fields, 'confidence'),
        poolingAlpha: optionalNumber(fields, 'poolingAlpha'),
      }),
      horizon: number(fields, 'horizon'),
    }
  },
  compute: shelfLife,
})

export const extrapolationCapTopic = topic({
  name: 'extrapolation-cap',
  says: 'Longest time that months of long-term data may support: decision tree of ICH Q1E (2003)',
  input:
    '{dataMonths, storage:"room"|"refrigerated"|"frozen", acceleratedChange, intermediateChange?, variable, statistics}',
  output: '{capMonths, rule}',
  notes:
    'capMonths equals dataMonths where nothing may be extrapolated. The months are seen in quotation, the factors 2X and 1.5X from memory.',
  example: examples['extrapolation-cap'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', [
      'dataMonths',
      'storage',
      'acceleratedChange',
      'intermediateChange',
      'variable',
      'statistics',
    ])
    return {
      dataMonths: number(fields, 'dataMonths'),
      storage: choice(fields, 'storage', ['room', 'refrigerated', 'frozen']),
      acceleratedChange: flag(fields, 'acceleratedChange'),
      ...given({ intermediateChange: optionalFlag(fields, 'intermediateChange') }),
      variable: flag(fields, 'variable'),
      statistics: flag(fields, 'statistics'),
    }
  },
  compute: extrapolationCap,
})

export const outlierTopic = topic({
  name: 'outlier',
  says: "Grubbs' test for one outlier, two-sided",
  input: '{values:[], alpha?:0.05}',
  output: '{g, critical, index, outlier}',
  notes: "Critical value (n − 1)/√n · √(t²/(n − 2 + t²)), t the upper alpha/(2n) quantile of Student's t.",
  example: examples.outlier,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['values', 'alpha'])
    return { values: numbers(fields, 'values'), ...given({ alpha: optionalNumber(fields, 'alpha') }) }
  },
  compute: outlier,
})
