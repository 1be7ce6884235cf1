import { centrifuge } from '../centrifuge'
import { droplets } from '../droplets'
import { jarPlan } from '../jar-plan'
import { phaseFraction } from '../phase-fraction'
import { settling } from '../settling'
import { examples } from './examples'
import { fieldsOf, flag, given, list, number, numbers, optionalNumber, optionalNumbers, text } from './read'
import { topic } from './topic'

export const phaseFractionTopic = topic({
  name: 'phase-fraction',
  says: 'Internal phase of a formula by mass and volume',
  input: '{lines:[{percent, density, internal}]}',
  output: '{totalPercent, internalMassPercent, internalVolumePercent, highInternalPhase}',
  notes:
    'φ = Σ(w/ρ of the internal lines) / Σ(w/ρ). Drops of mixed sizes stay round above 74 %, so the threshold is customary, not sharp.',
  example: examples['phase-fraction'],
  read: (raw) => ({
    lines: list(fieldsOf(raw, '', ['lines']), 'lines', (item, path) => {
      const line = fieldsOf(item, path, ['percent', 'density', 'internal'])
      return {
        percent: number(line, 'percent'),
        density: number(line, 'density'),
        internal: flag(line, 'internal'),
      }
    }),
  }),
  compute: phaseFraction,
})

export const dropletsTopic = topic({
  name: 'droplets',
  says: 'Mean diameters, volume median and span of a droplet count',
  input: '{diametersUm:[], counts?:[]}',
  output: '{d10, d32, d43, d50v, span}',
  notes:
    'Moment means in the notation of ISO 9276-2. Quantiles are linear between the diameters, each standing at the middle of its own share of the volume.',
  example: examples.droplets,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['diametersUm', 'counts'])
    return {
      diametersUm: numbers(fields, 'diametersUm'),
      ...given({ counts: optionalNumbers(fields, 'counts') }),
    }
  },
  compute: droplets,
})

export const centrifugeTopic = topic({
  name: 'centrifuge',
  says: 'Relative centrifugal force',
  input: '{rpm, radiusMm}',
  output: '{rcf}',
  notes: 'RCF = 1.118·10⁻⁶ · r(mm) · rpm².',
  example: examples.centrifuge,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['rpm', 'radiusMm'])
    return { rpm: number(fields, 'rpm'), radiusMm: number(fields, 'radiusMm') }
  },
  compute: centrifuge,
})

export const settlingTopic = topic({
  name: 'settling',
  says: 'Stokes velocity of a single drop',
  input: '{diameterUm, densityDifference, viscosityMPas, g?:9.80665}',
  output: '{velocityMmPerDay}',
  notes: 'v = g·d²·Δρ/(18·η). Dilute limit only, never for a packed emulsion, where drops hold each other.',
  example: examples.settling,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['diameterUm', 'densityDifference', 'viscosityMPas', 'g'])
    return {
      diameterUm: number(fields, 'diameterUm'),
      densityDifference: number(fields, 'densityDifference'),
      viscosityMPas: number(fields, 'viscosityMPas'),
      ...given({ g: optionalNumber(fields, 'g') }),
    }
  },
  compute: settling,
})

export const jarPlanTopic = topic({
  name: 'jar-plan',
  says: 'Jars and grams that a study takes of one batch',
  input:
    '{stations:[{name, timePoints:[], watchJars, measuringJarsPerPull, spares}], initialJars, retains, fillG, batchG, lossPercent}',
  output: '{jars, watchJars, measuringJars, spares, grams, fits, shortG}',
  notes: 'Every station has its own watch jars and spares, and its measuring jars at each of its times.',
  example: examples['jar-plan'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['stations', 'initialJars', 'retains', 'fillG', 'batchG', 'lossPercent'])
    return {
      stations: list(fields, 'stations', (item, path) => {
        const station = fieldsOf(item, path, [
          'name',
          'timePoints',
          'watchJars',
          'measuringJarsPerPull',
          'spares',
        ])
        return {
          name: text(station, 'name'),
          timePoints: numbers(station, 'timePoints'),
          watchJars: number(station, 'watchJars'),
          measuringJarsPerPull: number(station, 'measuringJarsPerPull'),
          spares: number(station, 'spares'),
        }
      }),
      initialJars: number(fields, 'initialJars'),
      retains: number(fields, 'retains'),
      fillG: number(fields, 'fillG'),
      batchG: number(fields, 'batchG'),
      lossPercent: number(fields, 'lossPercent'),
    }
  },
  compute: jarPlan,
})
