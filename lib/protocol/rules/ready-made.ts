import type { PlannedAttribute, PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'

import { freshAttribute } from './fresh-attribute'

/**
 * Ready-made protocols: a purpose (when and where) on an emulsion (how it is measured). They are a start that
 * a lab edits, not a rule; temperatures and weeks are common practice, no standard fixes them.
 */
export const purposes = {
  screen: {
    name: 'Prototype screen, 12 weeks',
    summary: '5, 25, 40 and 45 °C and five freeze-thaw cycles; weekly to week 6, then weeks 8, 10 and 12.',
  },
  'long-term': {
    name: 'Long-term study, 36 months',
    summary:
      '5, 25, 30 and 40 °C at 3, 6, 9, 12, 18, 24 and 36 months; 40 °C to 6 months. Meant for three batches.',
  },
  'freeze-thaw': {
    name: 'Freeze-thaw, 5 cycles',
    summary: 'Five weekly cycles, beside a jar at 25 °C that is read on the same days.',
  },
  transport: {
    name: 'Transport, 3 legs',
    summary: 'Three legs on the road in three weeks, beside a jar at 25 °C that stays.',
  },
} as const
export type Purpose = keyof typeof purposes

export const emulsions = {
  lotion: { name: 'oil-in-water lotion', summary: 'pH direct, disc spindle 4 at 20 rpm.' },
  cream: {
    name: 'high-internal-phase cream',
    summary: 'pH of an extract, T-bar C at 10 rpm on a descending stand.',
  },
  'stiff cream': {
    name: 'stiff high-internal-phase cream',
    summary: 'pH of an extract, T-bar D at 5 rpm on a descending stand.',
  },
} as const
export type Emulsion = keyof typeof emulsions

export function readyMadePlan(purpose: Purpose, emulsion: Emulsion): ProtocolPlan {
  return { ...shapes[purpose], attributes: measurements(emulsion) }
}

const weekly = [1, 2, 3, 4, 5]
const screenWeeks = [...weekly, 6, 8, 10, 12]
const quarters = [13, 26, 39, 52, 78, 104, 156]

const shapes: Record<Purpose, Omit<ProtocolPlan, 'attributes'>> = {
  screen: {
    ...vessel(30),
    endWeeks: 12,
    retains: 2,
    stations: [
      at(5, 'supports', screenWeeks),
      at(25, 'decides', screenWeeks),
      at(40, 'informs', screenWeeks),
      at(45, 'informs', screenWeeks),
      freezeThaw('decides'),
    ],
  },
  'long-term': {
    ...vessel(30),
    endWeeks: 156,
    retains: 4,
    stations: [
      at(5, 'supports', quarters, 7),
      at(25, 'decides', quarters, 7),
      at(30, 'informs', quarters.slice(0, 4), 7),
      at(40, 'informs', quarters.slice(0, 2), 7),
    ],
  },
  'freeze-thaw': {
    ...vessel(30),
    endWeeks: 5,
    retains: 1,
    stations: [at(25, 'supports', weekly), freezeThaw('decides')],
  },
  transport: {
    ...vessel(50),
    endWeeks: 3,
    retains: 1,
    stations: [
      at(25, 'supports', [1, 2, 3]),
      { ...at(25, 'decides', [1, 2, 3]), kind: 'transport', temperatureC: null },
    ],
  },
}

function at(
  temperatureC: number,
  voice: PlannedStation['voice'],
  timePoints: number[],
  windowDays = 1,
): PlannedStation {
  return {
    kind: 'temperature',
    temperatureC,
    voice,
    timePoints,
    windowDays,
    watchJars: 1,
    measuringJarsPerPull: 1,
    spares: 1,
  }
}

function freezeThaw(voice: PlannedStation['voice']): PlannedStation {
  return { ...at(25, voice, weekly), kind: 'freeze-thaw', temperatureC: null }
}

function vessel(fillG: number) {
  return {
    fillG,
    fillHeightMm: 40,
    lossPercent: 3,
    restHours: 2,
    initialJars: 1,
    pack: `glass jar for ${fillG} g, screw cap with liner`,
  }
}

function measurements(emulsion: Emulsion): PlannedAttribute[] {
  const isLotion = emulsion === 'lotion'
  return [
    {
      attribute: 'separation',
      // Under about six times what a ruler scatters, a band flags creams that stand still: 2 % in one study of seven.
      tolerance: { kind: 'range', upper: 5 },
      replicates: 1,
      method: 'ruler against the closed jar, top and bottom layer',
    },
    {
      attribute: 'look',
      tolerance: { kind: 'range', upper: 1 },
      replicates: 1,
      method: 'against the jar kept at 5 °C, daylight lamp',
    },
    {
      attribute: 'mass',
      tolerance: { kind: 'range', lower: -2, upper: 1 },
      replicates: 1,
      method: 'gross, unopened, at room temperature',
    },
    {
      attribute: 'ph',
      tolerance: { kind: 'shift', below: isLotion ? 0.3 : 0.5, above: isLotion ? 0.3 : 0.5 },
      replicates: 1,
      method: '',
      conditions: {
        ...(isLotion
          ? { phMethod: 'direct' }
          : { phMethod: 'extract', extractParts: 10, extractMinutes: 30 }),
        sampleTemperatureC: 25,
      },
    },
    { attribute: 'viscosity', ...viscosityOf[emulsion], replicates: 1 },
    {
      attribute: 'odour',
      tolerance: { kind: 'range', upper: 1 },
      replicates: 1,
      method: 'against the jar kept at 5 °C',
    },
    freshAttribute('feel'),
    // What comes apart under a thousand times gravity is not worth twelve weeks of ovens [practice].
    { ...freshAttribute('centrifuge'), isInitialOnly: true },
  ]
}

const viscosityOf: Record<
  Emulsion,
  Pick<PlannedAttribute, 'tolerance' | 'method' | 'viscosity' | 'conditions'>
> = {
  lotion: {
    tolerance: { kind: 'percent', below: 20, above: 20 },
    method: '',
    conditions: { seconds: 30, path: 'fixed', sampleTemperatureC: 25 },
    viscosity: { spindle: 'disc 4', spindleConstant: 2000, rpm: 20 },
  },
  cream: {
    tolerance: { kind: 'percent', below: 25, above: 25 },
    method: 'unstirred',
    conditions: { seconds: 30, path: 'descending', sampleTemperatureC: 25 },
    viscosity: { spindle: 'T-bar C', spindleConstant: 10_000, rpm: 10 },
  },
  'stiff cream': {
    tolerance: { kind: 'percent', below: 25, above: 25 },
    method: 'unstirred',
    conditions: { seconds: 30, path: 'descending', sampleTemperatureC: 25 },
    viscosity: { spindle: 'T-bar D', spindleConstant: 20_000, rpm: 5 },
  },
}
