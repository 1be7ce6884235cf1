import { acceleratedAge } from '../accelerated-age'
import { arrhenius } from '../arrhenius'
import { mkt } from '../mkt'
import { examples } from './examples'
import { fieldsOf, given, number, numbers, optionalNumber, optionalNumbers } from './read'
import { topic } from './topic'

export const mktTopic = topic({
  name: 'mkt',
  says: 'Mean kinetic temperature of a record, USP <1160>',
  input: '{temperaturesC:[], hoursEach?:[], deltaHkJ?:83.144}',
  output: '{mktC, meanC, minC, maxC}',
  notes:
    'T = (ΔH/R) / −ln(Σ h·e^(−ΔH/(R·T)) / Σ h) in kelvin, R = 8.314462618 J/(mol·K). A time of 0 hours counts for nothing.',
  example: examples.mkt,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['temperaturesC', 'hoursEach', 'deltaHkJ'])
    return {
      temperaturesC: numbers(fields, 'temperaturesC'),
      ...given({
        hoursEach: optionalNumbers(fields, 'hoursEach'),
        deltaHkJ: optionalNumber(fields, 'deltaHkJ'),
      }),
    }
  },
  compute: mkt,
})

export const arrheniusTopic = topic({
  name: 'arrhenius',
  says: 'Activation energy from rates at three or more temperatures, with predictions',
  input: '{temperaturesC:[], rates:[], predictC?:[]}',
  output: '{eaKJ, lnA, eaSe, r2, predictions:[{temperatureC, rate, low, high}], curvature:{p, doubt}}',
  notes:
    'Unweighted least squares of ln k on 1/T in kelvin, R = 8.314462618 J/(mol·K). Curvature is tested from four temperatures on: a curved plot means a mechanism that changes with temperature.',
  example: examples.arrhenius,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['temperaturesC', 'rates', 'predictC'])
    return {
      temperaturesC: numbers(fields, 'temperaturesC'),
      rates: numbers(fields, 'rates'),
      ...given({ predictC: optionalNumbers(fields, 'predictC') }),
    }
  },
  compute: arrhenius,
})

export const acceleratedAgeTopic = topic({
  name: 'accelerated-age',
  says: 'Months at an accelerated temperature that stand for a time in storage, by Q10',
  input: '{storageC, acceleratedC, q10, targetMonths}',
  output: '{factor, acceleratedMonths}',
  notes: 'An assumption, never evidence.',
  example: examples['accelerated-age'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['storageC', 'acceleratedC', 'q10', 'targetMonths'])
    return {
      storageC: number(fields, 'storageC'),
      acceleratedC: number(fields, 'acceleratedC'),
      q10: number(fields, 'q10'),
      targetMonths: number(fields, 'targetMonths'),
    }
  },
  compute: acceleratedAge,
})
