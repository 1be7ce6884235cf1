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
    'factor in mPa·s per % torque = spindleConstant ÷ rpm. doubt is null, or why: torque outside 10 to 100 %, or, where bandPercent (distance to the nearer edge in % of the value) is given, an error above a third of it.',
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
    'Least squares through two points or more; offsetMv is the potential at pH 7; a doubt outside 95 to 105 % of 2.302585·R·T/F.',
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
  notes: 'NBS/IUPAC tables, linear between them, 0 to 60 °C only.',
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
  notes: 'Heights in mm: the fill, free oil on top, water or serum below. A cream layer does not count.',
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
