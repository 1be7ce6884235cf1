import { closestPacking, highInternalPhaseAbove } from '../phase-fraction'
import type { Method } from './method'

const packing = `${(100 * highInternalPhaseAbove).toFixed(0)} %`

export const phaseFractionMethod: Method = {
  name: 'Internal phase',
  formula: [
    'A line’s volume is its % w/w ÷ its density; volumes are taken to add up.',
    'By volume: 100 × the volumes of the internal lines ÷ the volumes of all lines.',
    'By mass: 100 × the % w/w of the internal lines ÷ the total.',
    `High internal phase: above ${packing} by volume. Equal balls packed closest fill pi ÷ root of 18, ${(100 * closestPacking).toFixed(2)} %; drops of mixed sizes can stay round above it.`,
  ],
  inputs: [
    { key: 'total', says: 'total of the lines', unit: '% w/w' },
    { key: 'mass', says: 'internal lines by mass', unit: '%' },
    { key: 'volume', says: 'internal lines by volume', unit: '%' },
    { key: 'limit', says: 'closest packing, taken as', unit: '% v/v' },
  ],
  sources: [
    { text: 'Closest packing of equal balls', mark: 'handbook' },
    { text: 'Water-in-oil creams called high internal phase carry over 80 % water phase', mark: 'practice' },
  ],
  topic: 'phase-fraction',
}

export const filmMethod: Method = {
  name: 'Film between drops',
  formula: [
    'Diameter × (1 − inside) ÷ (3 × inside), inside as a share of the volume.',
    'The interface of drops of one mean diameter D[3,2] is 6 × inside ÷ diameter in a volume; two drops share each film.',
    'Taken for granted: all that is outside lies in even films between drops that touch. Corners hold more of it, so the films themselves are thinner.',
  ],
  inputs: [
    { key: 'volume', says: 'inside, by volume', unit: '%' },
    { key: 'diameterUm', says: 'drops, D[3,2]', unit: 'micrometres' },
  ],
  sources: [{ text: 'Geometry of interface and volume', mark: 'handbook' }],
  topic: null,
}

export const dropletsMethod: Method = {
  name: 'Drop sizes',
  formula: [
    'D[p,q] is the root, of order p − q, of the sum of counts × diameter to the p ÷ the sum of counts × diameter to the q.',
    'Span is (d90 − d10) ÷ d50, by volume.',
  ],
  inputs: [
    { key: 'diametersUm', says: 'diameters', unit: 'micrometres' },
    { key: 'counts', says: 'drops of each', unit: '' },
  ],
  sources: [{ text: 'ISO 9276-2, moment means', mark: 'standard' }],
  topic: 'droplets',
}

export const centrifugeMethod: Method = {
  name: 'Centrifugal force',
  formula: ['1.118 ÷ 1 000 000 × radius in mm × rpm × rpm, in multiples of gravity.'],
  inputs: [
    { key: 'rpm', says: 'speed', unit: 'rpm' },
    { key: 'radiusMm', says: 'radius', unit: 'mm' },
  ],
  sources: [
    { text: 'Centripetal acceleration over standard gravity', mark: 'handbook' },
    { text: '3 000 rpm for 30 minutes as a screen', mark: 'practice' },
  ],
  topic: 'centrifuge',
}

export const settlingMethod: Method = {
  name: 'Velocity of one drop',
  formula: [
    'Stokes: gravity × density difference × diameter × diameter ÷ (18 × viscosity).',
    'Dilute limit only, never for a packed emulsion.',
  ],
  inputs: [
    { key: 'diameterUm', says: 'diameter', unit: 'micrometres' },
    { key: 'densityDifference', says: 'continuous minus dispersed phase', unit: 'kg/m³' },
    { key: 'viscosityMPas', says: 'viscosity of the continuous phase', unit: 'mPa·s' },
    { key: 'g', says: 'gravity', unit: 'm/s²' },
  ],
  sources: [{ text: 'Stokes’ law', mark: 'handbook' }],
  topic: 'settling',
}

export const jarPlanMethod: Method = {
  name: 'Jars and grams of a study',
  formula: [
    'Jars: at each station watch jars, spares, and measuring jars × pulls; then those of the initial and the retains.',
    'Grams: jars × fill ÷ (1 − loss ÷ 100).',
    'Short: what that is above the grams of the batch.',
  ],
  inputs: [
    { key: 'watchJars', says: 'watch jars', unit: '' },
    { key: 'measuringJars', says: 'measuring jars', unit: '' },
    { key: 'spares', says: 'spares', unit: '' },
    { key: 'initialJars', says: 'jars of the initial', unit: '' },
    { key: 'retains', says: 'retains', unit: '' },
    { key: 'fillG', says: 'fill of a jar', unit: 'g' },
    { key: 'lossPercent', says: 'lost while filling', unit: '%' },
    { key: 'batchG', says: 'left of the batch', unit: 'g' },
    { key: 'grams', says: 'needed', unit: 'g' },
    { key: 'shortG', says: 'short', unit: 'g' },
  ],
  sources: [{ text: 'Jars and loss as the protocol states them', mark: 'practice' }],
  topic: 'jar-plan',
}
