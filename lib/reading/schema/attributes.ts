import { z } from '@/lib/http/zod'

/**
 * What can be measured on a jar. `possible` is what the instrument or the definition allows (beyond it
 * an entry is refused); what is merely unlikely is for the drift rules. Repeatability is one standard
 * deviation of the method, "absolute" in the unit or "relative" to the initial [memory, a lab setting].
 */
export type AttributeKind = 'number' | 'torque' | 'layers' | 'word'

export type Attribute = {
  key: string
  label: string
  unit: string
  decimals: number | 'three figures'
  kind: AttributeKind
  jar: 'watch' | 'measuring'
  possible: { lower: number; upper: number }
  repeatability: { kind: 'absolute' | 'relative'; sd: number; highInternalPhaseSd: number }
  words?: readonly string[]
  /** Regression may carry it to a shelf life; the others support the last time at which every jar passed. */
  isGradual: boolean
}

const comparisonWords = ['as the initial', 'slightly changed', 'changed', 'strongly changed'] as const

export const attributes = {
  separation: {
    key: 'separation',
    label: 'Separation',
    unit: '%',
    decimals: 1,
    kind: 'layers',
    jar: 'watch',
    possible: { lower: 0, upper: 100 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    isGradual: false,
  },
  look: {
    key: 'look',
    label: 'Look',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'watch',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: comparisonWords,
    isGradual: false,
  },
  odour: {
    key: 'odour',
    label: 'Odour',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'measuring',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: comparisonWords,
    isGradual: false,
  },
  mass: {
    key: 'mass',
    label: 'Mass change',
    unit: '%',
    decimals: 1,
    kind: 'number',
    jar: 'watch',
    possible: { lower: -100, upper: 10 },
    repeatability: { kind: 'absolute', sd: 0.05, highInternalPhaseSd: 0.05 },
    isGradual: true,
  },
  ph: {
    key: 'ph',
    label: 'pH',
    unit: '',
    decimals: 2,
    kind: 'number',
    jar: 'measuring',
    possible: { lower: 0, upper: 14 },
    repeatability: { kind: 'absolute', sd: 0.03, highInternalPhaseSd: 0.1 },
    isGradual: true,
  },
  viscosity: {
    key: 'viscosity',
    label: 'Viscosity',
    unit: 'mPa·s',
    decimals: 'three figures',
    kind: 'torque',
    jar: 'measuring',
    possible: { lower: 1, upper: 100_000_000 },
    repeatability: { kind: 'relative', sd: 0.03, highInternalPhaseSd: 0.08 },
    isGradual: true,
  },
  leakage: {
    key: 'leakage',
    label: 'Leakage',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'watch',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: ['none', 'a trace', 'drops', 'runs out'],
    isGradual: false,
  },
  panelling: {
    key: 'panelling',
    label: 'Panelling',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'watch',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: ['none', 'slight', 'clear', 'collapsed'],
    isGradual: false,
  },
  pump: {
    key: 'pump',
    label: 'Pump',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'measuring',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: ['as the initial', 'first strokes empty', 'weak', 'fails'],
    isGradual: false,
  },
} as const satisfies Record<string, Attribute>

export type AttributeKey = keyof typeof attributes

export const attributeKey = z.enum(Object.keys(attributes) as [AttributeKey, ...AttributeKey[]])

/** By definition nothing has happened yet at the start, whether or not somebody wrote it down. */
export function startsAtZero(key: AttributeKey): boolean {
  return key === 'separation' || key === 'mass' || attributes[key].kind === 'word'
}

export function attributeOf(key: AttributeKey): Attribute {
  return attributes[key]
}
