import { phEfficiencyRange } from '../ph-slope'
import { torqueRange } from '../viscosity'
import type { Method } from './method'

export const viscosityMethod: Method = {
  name: 'Viscosity from torque',
  formula: [
    'Torque in % × factor; the factor is the constant of spindle and spring ÷ rpm.',
    'Full scale is 100 × the factor. At 1 % of full scale either way the reading’s error is 100 ÷ torque, in %.',
    `A doubt outside ${torqueRange.low} to ${torqueRange.high} % torque, and where the error is above a third of the band.`,
  ],
  inputs: [
    { key: 'torquePercent', says: 'torque', unit: '%' },
    { key: 'factor', says: 'factor', unit: 'mPa·s a %' },
    { key: 'spindleConstant', says: 'constant of spindle and spring', unit: 'mPa·s rpm a %' },
    { key: 'rpm', says: 'speed', unit: 'rpm' },
    { key: 'fullScalemPas', says: 'full scale', unit: 'mPa·s' },
    { key: 'errorPercent', says: 'error of the reading', unit: '%' },
    { key: 'bandPercent', says: 'from the initial to the nearer edge', unit: '%' },
  ],
  sources: [
    { text: 'Torque range, and the error against the band', mark: 'practice' },
    { text: 'ISO 2555 is of single cylinders and does not cover T-bars', mark: 'memory' },
  ],
  topic: 'viscosity',
}

export const phSlopeMethod: Method = {
  name: 'Slope of the pH meter',
  formula: [
    'Least-squares line of millivolts on the buffers’ pH; the offset is its potential at pH 7.',
    'Efficiency: −100 × slope ÷ (2.302585 × R × T ÷ F), which is 59.16 mV a pH at 25 °C.',
    `A doubt outside ${phEfficiencyRange.low} to ${phEfficiencyRange.high} %.`,
  ],
  inputs: [
    { key: 'points', says: 'buffers, pH and mV', unit: '' },
    { key: 'temperatureC', says: 'temperature', unit: '°C' },
    { key: 'slopeMvPerPh', says: 'slope', unit: 'mV a pH' },
    { key: 'offsetMv', says: 'offset', unit: 'mV' },
    { key: 'efficiencyPercent', says: 'efficiency', unit: '%' },
  ],
  sources: [
    { text: 'Slope of Nernst, constants of CODATA 2018', mark: 'handbook' },
    {
      text: `Limits of ${phEfficiencyRange.low} to ${phEfficiencyRange.high} %; USP <791> allows 90 to 105 %`,
      mark: 'practice',
    },
  ],
  topic: 'ph-slope',
}

export const bufferPhMethod: Method = {
  name: 'pH of a buffer',
  formula: [
    'The table of the buffer, 0 to 60 °C in steps of 5, linear between them.',
    'A bought buffer carries the table of its own certificate instead.',
  ],
  inputs: [
    { key: 'buffer', says: 'buffer', unit: '' },
    { key: 'temperatureC', says: 'temperature', unit: '°C' },
  ],
  sources: [{ text: 'Standard tables of NBS and IUPAC', mark: 'standard' }],
  topic: 'buffer-ph',
}

export const separationMethod: Method = {
  name: 'Separation',
  formula: [
    '100 × (oil on top + water below) ÷ height of the fill. A cream layer does not count.',
    'Told from none above 1 %, or 100 ÷ the height in mm where that is more; of several jars the worst counts.',
  ],
  inputs: [
    { key: 'topMm', says: 'oil on top', unit: 'mm' },
    { key: 'bottomMm', says: 'water below', unit: 'mm' },
    { key: 'totalMm', says: 'height of the fill', unit: 'mm' },
    { key: 'detectPercent', says: 'told from none above', unit: '%' },
  ],
  sources: [{ text: 'A ruler reads about 1 mm; the worst jar counts', mark: 'practice' }],
  topic: 'separation',
}

export const separationCurveMethod: Method = {
  name: 'Course of a separation',
  formula: [
    'None above the detection limit; or a straight line from when it begins; or plateau × (1 − e to the −k × (t − onset)).',
    'The bent curve where it explains more by an F test at 0.05, from five times on. The onset is the first crossing of the detection limit, interpolated.',
  ],
  inputs: [
    { key: 't', says: 'times', unit: 'weeks' },
    { key: 'percent', says: 'separation', unit: '%' },
    { key: 'detectPercent', says: 'detection limit', unit: '%' },
  ],
  sources: [{ text: 'Shape of the curve and choice of it', mark: 'practice' }],
  topic: 'separation-curve',
}

export const colourMethod: Method = {
  name: 'Colour difference',
  formula: ['CIEDE2000 between the initial and the sample; beside it the distance in L*, a*, b*.'],
  inputs: [
    { key: 'reference', says: 'initial, L* a* b*', unit: '' },
    { key: 'sample', says: 'sample, L* a* b*', unit: '' },
  ],
  sources: [{ text: 'CIE 142-2001; Sharma, Wu and Dalal 2005', mark: 'standard' }],
  topic: 'colour',
}
