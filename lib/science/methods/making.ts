import type { Method } from './method'

const arithmetic = { text: 'Arithmetic of what was typed', mark: 'handbook' } as const

export const totalMethod: Method = {
  name: 'Total of the formula',
  formula: ['The sum of % w/w over all lines, added as whole thousandths, so that 100.00 is exact.'],
  inputs: [
    { key: 'lines', says: 'lines', unit: '' },
    { key: 'missing', says: 'missing to 100', unit: '%' },
  ],
  sources: [arithmetic],
  topic: 'phase-fraction',
}

export const costMethod: Method = {
  name: 'Cost of a kilogram',
  formula: ['The sum over lines with a price of % w/w × price of a kilogram ÷ 100, rounded to the cent.'],
  inputs: [
    { key: 'priced', says: 'lines with a price', unit: '' },
    { key: 'unpriced', says: 'lines without', unit: '' },
  ],
  sources: [arithmetic],
  topic: null,
}

export const jarCostMethod: Method = {
  name: 'Cost of a jar’s content',
  formula: ['Cost of a kilogram × grams in a jar ÷ 1000. Lines without a price count as nothing.'],
  inputs: [
    { key: 'perKg', says: 'cost of a kilogram', unit: 'per kg' },
    { key: 'grams', says: 'in a jar', unit: 'g' },
    { key: 'unpriced', says: 'lines without a price', unit: '' },
  ],
  sources: [arithmetic],
  topic: null,
}

export const oilWaterMethod: Method = {
  name: 'Oil to water',
  formula: ['The sum of % w/w over the lines of the oil phase, to that over the lines of the water phase.'],
  inputs: [
    { key: 'oil', says: 'oil phase', unit: '% w/w' },
    { key: 'water', says: 'water phase', unit: '% w/w' },
  ],
  sources: [arithmetic],
  topic: null,
}

export const weighingMethod: Method = {
  name: 'Difference at the balance',
  formula: ['100 × (actual − target) ÷ target. The target is the batch’s size × % w/w ÷ 100.'],
  inputs: [
    { key: 'sizeG', says: 'size of the batch', unit: 'g' },
    { key: 'percent', says: 'share of the line', unit: '% w/w' },
    { key: 'targetG', says: 'target', unit: 'g' },
    { key: 'actualG', says: 'weighed', unit: 'g' },
    { key: 'allowedG', says: 'allowed either way', unit: 'g' },
  ],
  sources: [
    { text: 'The batch’s own tolerance is allowed, usually 1 %, never under 0.01 g', mark: 'practice' },
  ],
  topic: null,
}

export const yieldMethod: Method = {
  name: 'Yield',
  formula: ['100 × what came out ÷ what was weighed in.'],
  inputs: [
    { key: 'yieldG', says: 'came out', unit: 'g' },
    { key: 'weighedG', says: 'went in', unit: 'g' },
  ],
  sources: [arithmetic],
  topic: null,
}

export const massChangeMethod: Method = {
  name: 'Mass change',
  formula: ['−100 × (first gross − gross) ÷ (first gross − tare), the same unopened jar.'],
  inputs: [
    { key: 'firstGrossG', says: 'first gross', unit: 'g' },
    { key: 'tareG', says: 'tare', unit: 'g' },
    { key: 'grossG', says: 'gross now', unit: 'g' },
  ],
  sources: [arithmetic],
  topic: null,
}

export const hashMethod: Method = {
  name: 'Hash of the frozen case',
  formula: [
    'SHA-256 of the case’s content written as canonical JSON (RFC 8785). Any change of a digit gives another hash.',
  ],
  inputs: [{ key: 'bytes', says: 'frozen', unit: '' }],
  sources: [{ text: 'FIPS 180-4; RFC 8785', mark: 'standard' }],
  topic: null,
}

export const excursionMethod: Method = {
  name: 'Excursions',
  formula: [
    'A stretch begins with the first temperature outside the limits and ends when the first one inside was taken; its hours run between the two.',
  ],
  inputs: [
    { key: 'low', says: 'lower limit', unit: '°C' },
    { key: 'high', says: 'upper limit', unit: '°C' },
    { key: 'extremeC', says: 'went to', unit: '°C' },
    { key: 'hours', says: 'hours', unit: 'h' },
  ],
  sources: [{ text: 'Limits are the lab’s own; a mean never excuses an excursion', mark: 'practice' }],
  topic: null,
}

export const checkFluidMethod: Method = {
  name: 'Check of the viscometer',
  formula: ['100 × (read ÷ value of the fluid − 1). In doubt beyond what is allowed.'],
  inputs: [
    { key: 'fluidMPas', says: 'value of the fluid', unit: 'mPa·s' },
    { key: 'readMPas', says: 'read', unit: 'mPa·s' },
    { key: 'allowedPercent', says: 'allowed either way', unit: '%' },
  ],
  sources: [{ text: 'The allowance is typed by the lab', mark: 'practice' }],
  topic: null,
}
