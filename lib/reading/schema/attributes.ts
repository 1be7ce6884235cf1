import type { OwnAttribute } from './own'
import { isOwn, ownName, type OwnKey } from './own-key'

/**
 * What can be measured on a jar. `possible` is what the instrument or the definition allows (beyond it
 * an entry is refused); what is merely unlikely is for the drift rules. Repeatability is one standard
 * deviation of the method, "absolute" in the unit or "relative" to the initial [memory, a lab setting].
 */
export type AttributeKind =
  'number' | 'torque' | 'layers' | 'word' | 'type' | 'colour' | 'droplets' | 'centrifuge'

type Described = {
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
  feel: {
    key: 'feel',
    label: 'Feel',
    unit: '',
    decimals: 0,
    kind: 'word',
    jar: 'measuring',
    possible: { lower: 0, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: comparisonWords,
    isGradual: false,
  },
  type: {
    key: 'type',
    label: 'Emulsion type',
    unit: '',
    decimals: 0,
    kind: 'type',
    jar: 'measuring',
    possible: { lower: 0, upper: 2 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    words: ['as the initial', 'not clear', 'turned over'],
    isGradual: false,
  },
  colour: {
    key: 'colour',
    label: 'Colour difference',
    unit: '',
    decimals: 1,
    kind: 'colour',
    jar: 'measuring',
    possible: { lower: 0, upper: 200 },
    repeatability: { kind: 'absolute', sd: 0.3, highInternalPhaseSd: 0.3 },
    isGradual: false,
  },
  droplets: {
    key: 'droplets',
    label: 'Droplet size',
    unit: 'micrometres',
    decimals: 'three figures',
    kind: 'droplets',
    jar: 'measuring',
    possible: { lower: 0.01, upper: 2000 },
    repeatability: { kind: 'relative', sd: 0.05, highInternalPhaseSd: 0.08 },
    isGradual: false,
  },
  density: {
    key: 'density',
    label: 'Density',
    unit: 'g/mL',
    decimals: 3,
    kind: 'number',
    jar: 'measuring',
    possible: { lower: 0.2, upper: 3 },
    repeatability: { kind: 'absolute', sd: 0.002, highInternalPhaseSd: 0.004 },
    isGradual: true,
  },
  conductivity: {
    key: 'conductivity',
    label: 'Conductivity',
    unit: 'microsiemens per cm',
    decimals: 'three figures',
    kind: 'number',
    jar: 'measuring',
    possible: { lower: 0, upper: 1_000_000 },
    repeatability: { kind: 'relative', sd: 0.05, highInternalPhaseSd: 0.1 },
    isGradual: false,
  },
  centrifuge: {
    key: 'centrifuge',
    label: 'Centrifuge',
    unit: 'mm',
    decimals: 1,
    kind: 'centrifuge',
    jar: 'measuring',
    possible: { lower: 0, upper: 200 },
    repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    isGradual: false,
  },
} as const satisfies Record<string, Described>

export type KnownKey = keyof typeof attributes
export type AttributeKey = KnownKey | OwnKey
export type Attribute = Omit<Described, 'key'> & { key: AttributeKey }

/** By definition nothing has happened yet at the start, whether or not somebody wrote it down. */
const nothingYet: ReadonlySet<AttributeKind> = new Set(['layers', 'word', 'type', 'colour'])

export function startsAtZero({ key, kind }: Pick<Attribute, 'key' | 'kind'>): boolean {
  return key === 'mass' || nothingYet.has(kind)
}

/** Kinds whose text is no single number, such as the three of a colour or the sizes of drops. */
export const readByText: ReadonlySet<AttributeKind> = new Set(['type', 'colour', 'droplets', 'centrifuge'])

/** Read as a difference from the batch's own initial, which is therefore needed whatever the tolerance. */
export function toldFromInitial({ attribute }: { attribute: string }): boolean {
  return attribute === 'colour'
}

/** Where an attribute of a protocol's own is described: in what is planned of it, or in the whole plan. */
export type Describing =
  | { own?: OwnAttribute | null | undefined }
  | { attributes: readonly { attribute: string; own?: OwnAttribute | undefined }[] }

/** What a key stands for. Without a plan an own attribute has its name alone: no unit and no words. */
export function attributeOf(key: KnownKey): Attribute
export function attributeOf(key: string, from: Describing | undefined): Attribute
export function attributeOf(key: string, from?: Describing): Attribute {
  if (!isOwn(key)) return attributes[key as KnownKey] ?? described(`own.${key}`, undefined)
  const own =
    from && 'attributes' in from ? from.attributes.find((one) => one.attribute === key)?.own : from?.own
  return described(key, own ?? undefined)
}

function described(key: OwnKey, own: OwnAttribute | undefined): Attribute {
  const label = ownName(key)
  if (own?.kind === 'scale') {
    return {
      ...{
        key,
        label,
        unit: '',
        decimals: 0,
        kind: 'word',
        jar: own.jar,
        words: own.words,
        isGradual: false,
      },
      possible: { lower: 0, upper: own.words.length - 1 },
      repeatability: { kind: 'absolute', sd: 0.5, highInternalPhaseSd: 0.5 },
    }
  }
  const { unit = '', decimals = 2, lower = -1e9, upper = 1e9, scatter = 0 } = own ?? {}
  return {
    ...{ key, label, unit, decimals, kind: 'number', jar: own?.jar ?? 'measuring' },
    possible: { lower, upper },
    repeatability: { kind: 'absolute', sd: scatter, highInternalPhaseSd: scatter },
    isGradual: own?.isGradual ?? false,
  }
}

/** The name, for which no plan is needed. */
export function attributeName(key: string): string {
  return attributeOf(key, undefined).label
}
