import type { PlannedAttribute } from '@/lib/protocol/schema'
import type { KnownKey } from '@/lib/reading/schema/attributes'
import type { OwnAttribute } from '@/lib/reading/schema/own'
import type { OwnKey } from '@/lib/reading/schema/own-key'

type Begun = Partial<Omit<PlannedAttribute, 'attribute'>> & Pick<PlannedAttribute, 'tolerance'>

/** Where a new attribute of a plan begins; all of it is there to be edited [practice, no source]. */
const begun: Record<KnownKey, Begun> = {
  separation: { tolerance: { kind: 'range', upper: 5 }, method: 'ruler against the closed jar' },
  look: { tolerance: { kind: 'range', upper: 1 }, method: 'against the jar kept at 5 °C' },
  odour: { tolerance: { kind: 'range', upper: 1 }, method: 'against the jar kept at 5 °C' },
  feel: { tolerance: { kind: 'range', upper: 1 }, method: 'on the back of the hand, against the initial' },
  mass: { tolerance: { kind: 'range', lower: -2, upper: 1 }, method: 'gross, unopened' },
  ph: { tolerance: { kind: 'shift', below: 0.3, above: 0.3 } },
  viscosity: { tolerance: { kind: 'percent', below: 20, above: 20 } },
  leakage: { tolerance: { kind: 'range', upper: 1 } },
  panelling: { tolerance: { kind: 'range', upper: 1 } },
  pump: { tolerance: { kind: 'range', upper: 1 } },
  type: { tolerance: { kind: 'range', upper: 1 }, method: 'a drop in water and a drop in oil' },
  colour: { tolerance: { kind: 'range', upper: 2 }, method: 'CIELAB, D65, 10 degrees' },
  droplets: {
    tolerance: { kind: 'percent', above: 50 },
    method: 'microscope, diluted in the outer phase',
    dropletMeasure: 'd50v',
  },
  density: { tolerance: { kind: 'shift', below: 0.02, above: 0.02 }, method: 'pycnometer, at 25 °C' },
  conductivity: { tolerance: { kind: 'percent', below: 30, above: 30 }, method: 'at 25 °C' },
  centrifuge: {
    tolerance: { kind: 'range', upper: 0.5 },
    method: 'tube of 15 mL',
    centrifuge: { rpm: 3000, radiusMm: 100, minutes: 30 },
  },
}

export function freshAttribute(attribute: KnownKey): PlannedAttribute {
  return { attribute, replicates: 1, method: '', ...begun[attribute] }
}

export function freshOwn(attribute: OwnKey, kind: OwnAttribute['kind']): PlannedAttribute {
  const common = { attribute, replicates: 1, method: '' }
  return kind === 'scale'
    ? {
        ...common,
        own: { kind, words: ['as the initial', 'slightly changed', 'changed'], jar: 'watch' },
        tolerance: { kind: 'range', upper: 1 },
      }
    : {
        ...common,
        own: {
          ...{ kind, unit: '', decimals: 1, lower: 0, upper: 100, scatter: 0 },
          ...{ isGradual: false, jar: 'measuring' },
        },
        tolerance: { kind: 'percent', below: 20, above: 20 },
      }
}
