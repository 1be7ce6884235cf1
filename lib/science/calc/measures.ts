import { bufferPh } from '../buffer-ph'
import { ScienceError } from '../guard'
import { phSlope } from '../ph-slope'
import { separation } from '../separation'
import { viscosity } from '../viscosity'
import { examples } from './examples'
import { choice, fieldsOf, given, has, list, number, optionalNumber } from './read'
import { topic } from './topic'

export const viscosityTopic = topic({
  name: 'viscosity',
  says: 'Viscosity from torque, with the error that ±1 % of full scale leaves',
  input: '{torquePercent, factor} or {torquePercent, spindleConstant, rpm}, bandPercent?',
  output: '{mPas, fullScalemPas, errorPercent, doubt}',
  notes:
    'factor = spindleConstant ÷ rpm. ISO 2555 describes the single-cylinder method and does not cover T-bars [memory].',
  example: examples.viscosity,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['torquePercent', 'factor', 'spindleConstant', 'rpm', 'bandPercent'])
    const common = {
      torquePercent: number(fields, 'torquePercent'),
      ...given({ bandPercent: optionalNumber(fields, 'bandPercent') }),
    }
    if (has(fields, 'factor') && (has(fields, 'spindleConstant') || has(fields, 'rpm'))) {
      throw new ScienceError('factor', 'stands for spindleConstant and rpm: give one or the other')
    }
    return has(fields, 'spindleConstant') || has(fields, 'rpm')
      ? { ...common, spindleConstant: number(fields, 'spindleConstant'), rpm: number(fields, 'rpm') }
      : { ...common, factor: number(fields, 'factor') }
  },
  compute: viscosity,
})

export const phSlopeTopic = topic({
  name: 'ph-slope',
  says: 'Slope, offset and efficiency of a pH meter from its buffers',
  input: '{points:[{bufferPh, mV}], temperatureC}',
  output: '{slopeMvPerPh, offsetMv, efficiencyPercent, doubt}',
  notes:
    'Least squares of mV on pH through two points or more. The limits of the doubt are practice; USP <791> allows 90 to 105 %.',
  example: examples['ph-slope'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['points', 'temperatureC'])
    return {
      points: list(fields, 'points', (item, path) => {
        const point = fieldsOf(item, path, ['bufferPh', 'mV'])
        return { bufferPh: number(point, 'bufferPh'), mV: number(point, 'mV') }
      }),
      temperatureC: number(fields, 'temperatureC'),
    }
  },
  compute: phSlope,
})

export const bufferPhTopic = topic({
  name: 'buffer-ph',
  says: 'pH of a standard buffer at a temperature',
  input: '{buffer:"phthalate"|"phosphate"|"borax", temperatureC}',
  output: '{ph}',
  notes: 'NBS/IUPAC tables every 5 °C. Bought buffers carry the table of their own certificate instead.',
  example: examples['buffer-ph'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['buffer', 'temperatureC'])
    return {
      buffer: choice(fields, 'buffer', ['phthalate', 'phosphate', 'borax']),
      temperatureC: number(fields, 'temperatureC'),
    }
  },
  compute: bufferPh,
})

export const separationTopic = topic({
  name: 'separation',
  says: 'Separation in % of fill height from layer heights',
  input: '{totalMm, topMm, bottomMm}',
  output: '{topPercent, bottomPercent, percent}',
  notes: 'A cream layer does not count. Heights may be in any one unit.',
  example: examples.separation,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['totalMm', 'topMm', 'bottomMm'])
    return {
      totalMm: number(fields, 'totalMm'),
      topMm: number(fields, 'topMm'),
      bottomMm: number(fields, 'bottomMm'),
    }
  },
  compute: separation,
})
