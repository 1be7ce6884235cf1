import { defaultDeltaHkJ } from '../mean-kinetic-temperature'
import type { Method } from './method'

export const mktMethod: Method = {
  name: 'Mean kinetic temperature',
  formula: [
    'The one temperature with the same mean rate as the record: (H ÷ R) ÷ −ln(the mean of e to the −H ÷ (R × T), each weighted by its hours), T in kelvin.',
    `H is ${defaultDeltaHkJ} kJ/mol. The plain mean is weighted likewise.`,
    'Hours of an entry: half the gap to its neighbours on either side.',
  ],
  inputs: [
    { key: 'entries', says: 'temperatures', unit: '' },
    { key: 'meanC', says: 'mean', unit: '°C' },
    { key: 'minC', says: 'lowest', unit: '°C' },
    { key: 'maxC', says: 'highest', unit: '°C' },
    { key: 'deltaHkJ', says: 'activation enthalpy', unit: 'kJ/mol' },
  ],
  sources: [
    { text: 'USP <1160>; Haynes 1971', mark: 'standard' },
    { text: 'It never excuses an excursion for an emulsion', mark: 'practice' },
  ],
  topic: 'mkt',
}

export const arrheniusMethod: Method = {
  name: 'Activation energy',
  formula: [
    'Unweighted line of ln rate on 1 ÷ T in kelvin; the energy is −R × slope.',
    'Limits at 95 %, two-sided, of the mean. Curvature is tested from four temperatures on.',
  ],
  inputs: [
    { key: 'temperaturesC', says: 'temperatures', unit: '°C' },
    { key: 'rates', says: 'rates', unit: '' },
  ],
  sources: [{ text: 'Arrhenius equation, least squares', mark: 'handbook' }],
  topic: 'arrhenius',
}

export const acceleratedAgeMethod: Method = {
  name: 'Accelerated age',
  formula: ['Factor: Q10 to the (accelerated − storage) ÷ 10. An assumption, never evidence.'],
  inputs: [
    { key: 'storageC', says: 'storage', unit: '°C' },
    { key: 'acceleratedC', says: 'accelerated', unit: '°C' },
    { key: 'q10', says: 'Q10', unit: '' },
    { key: 'targetMonths', says: 'time to stand for', unit: 'months' },
  ],
  sources: [{ text: 'Rule of Q10', mark: 'practice' }],
  topic: 'accelerated-age',
}
