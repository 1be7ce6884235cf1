import type { PlannedAttribute } from '@/lib/protocol/schema'
import { ScienceError } from '@/lib/science/guard'
import { massChangePercent } from '@/lib/science/mass-change'
import { separation } from '@/lib/science/separation'
import { viscosity, viscosityFactor } from '@/lib/science/viscosity'
import { attributeOf, type Attribute, type AttributeKey } from '../schema/attributes'
import type { EntryDetail } from '../schema/entry'
import { readTyped } from '../schema/typed'

/** What must be known of the jar and the protocol to make a value of what was typed. */
export type ValueContext = {
  planned: Pick<PlannedAttribute, 'own' | 'viscosity' | 'rulerMm' | 'dropletMeasure' | 'centrifuge'> | null
  jar: { tareG: number | null; grossG: number | null; fillHeightMm: number | null }
  /** Of the instrument that was used. */
  spindles: { name: string; constant: number }[]
  /** The value before this one, to say what may have slipped. */
  last: number | null
}

export type TypedEntry = { attribute: AttributeKey; typed: string; detail: EntryDetail }
export type EntryValue = { value: number; word: string | null; detail: Record<string, unknown> }

/** Why an entry cannot be so, by the field of the entry that says it: `typed` or `detail.topMm`. */
export class ImpossibleEntry extends Error {
  constructor(
    readonly field: string,
    readonly sentence: string,
  ) {
    super(sentence)
  }
}

/** The value of what was typed; throws an ImpossibleEntry where no jar could have given it. */
export function valueOf(entry: TypedEntry, context: ValueContext): EntryValue {
  const attribute = attributeOf(entry.attribute, context.planned ?? {})
  const temperature = entry.detail.sampleTemperatureC
  if (temperature !== undefined && (temperature < -30 || temperature > 120)) {
    throw new ImpossibleEntry(
      'detail.sampleTemperatureC',
      'A sample lies between −30 and 120 °C. Type it again.',
    )
  }
  switch (attribute.kind) {
    case 'layers':
      return layersValue(entry, context)
    case 'word':
      return wordValue(entry, attribute)
    case 'torque':
      return entry.detail.torquePercent === undefined
        ? plain(entry, attribute, context)
        : torqueValue(entry, context)
    case 'type':
    case 'colour':
    case 'droplets':
    case 'centrifuge':
      return plain(entry, attribute, context)
    case 'number':
      return entry.detail.grossG === undefined ? plain(entry, attribute, context) : massValue(entry, context)
  }
}

function plain(entry: TypedEntry, attribute: Attribute, { last }: ValueContext): EntryValue {
  const value = readTyped(entry.typed)
  if (value === null) {
    throw new ImpossibleEntry(
      'typed',
      `${attribute.label} is a number, with one decimal point or comma. Type it again.`,
    )
  }
  const { lower, upper } = attribute.possible
  if (value < lower || value > upper) {
    throw new ImpossibleEntry('typed', `${rangeSentence(attribute)} ${slipSentence(value, last)}`.trim())
  }
  return { value, word: null, detail: entry.detail }
}

function torqueValue(entry: TypedEntry, { planned, spindles }: ValueContext): EntryValue {
  const { torquePercent, spindle, rpm } = { ...planned?.viscosity, ...entry.detail }
  if (torquePercent === undefined || readTyped(entry.typed) !== torquePercent) {
    throw new ImpossibleEntry(
      'typed',
      'The torque that was typed and the one that was sent differ. Type it again.',
    )
  }
  if (torquePercent <= 0 || torquePercent > 110) {
    throw new ImpossibleEntry(
      'typed',
      'Torque runs from 0 to 100 %, and at 0 % the spindle turns in nothing. Read it again.',
    )
  }
  if (!spindle) throw new ImpossibleEntry('detail.spindle', 'Say which spindle was on.')
  if (rpm === undefined || rpm <= 0 || rpm > 10_000) {
    throw new ImpossibleEntry('detail.rpm', 'Say how fast the spindle turned, in rpm above 0.')
  }
  const constant =
    spindle === planned?.viscosity?.spindle
      ? planned.viscosity.spindleConstant
      : spindles.find(({ name }) => name === spindle)?.constant
  if (constant === undefined) {
    throw new ImpossibleEntry(
      'detail.spindle',
      `The constant of spindle ${spindle} is not known here. Choose the instrument it belongs to, or enter mPa·s.`,
    )
  }
  const { mPas, errorPercent } = viscosity({ torquePercent, factor: viscosityFactor(constant, rpm) })
  return {
    value: computed(mPas),
    word: null,
    detail: { ...entry.detail, spindle, rpm, spindleConstant: constant, errorPercent },
  }
}

function layersValue(entry: TypedEntry, { jar }: ValueContext): EntryValue {
  const { topMm = 0, bottomMm = 0, bleed } = entry.detail
  const totalMm = entry.detail.totalMm ?? jar.fillHeightMm
  if (entry.detail.topMm === undefined && entry.detail.bottomMm === undefined && bleed === undefined) {
    throw new ImpossibleEntry(
      'detail.topMm',
      'Give the height of the layer on top and below; 0 where there is none.',
    )
  }
  if (bleed !== undefined && (bleed < 0 || bleed > 4)) {
    throw new ImpossibleEntry('detail.bleed', 'Bleed is a whole number from 0 to 4.')
  }
  if (totalMm === null || totalMm <= 0) {
    throw new ImpossibleEntry('detail.totalMm', 'Give the height of the fill in mm, above 0.')
  }
  for (const [field, height, name] of [
    ['detail.topMm', topMm, 'The layer on top'],
    ['detail.bottomMm', bottomMm, 'The layer below'],
  ] as const) {
    if (height < 0) throw new ImpossibleEntry(field, `${name} cannot be under 0 mm. Type it again.`)
    if (height > totalMm) {
      throw new ImpossibleEntry(
        field,
        `${name} cannot be ${height} mm high in a fill of ${totalMm} mm. Measure it again.`,
      )
    }
  }
  try {
    const { percent, topPercent, bottomPercent } = separation({ totalMm, topMm, bottomMm })
    return {
      value: computed(percent),
      word: null,
      detail: { ...entry.detail, topMm, bottomMm, totalMm, topPercent, bottomPercent },
    }
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    throw new ImpossibleEntry(
      'detail.bottomMm',
      `Both layers together are higher than the fill of ${totalMm} mm. Measure them again.`,
    )
  }
}

function massValue(entry: TypedEntry, { jar }: ValueContext): EntryValue {
  const grossG = entry.detail.grossG!
  if (jar.tareG === null || jar.grossG === null || jar.grossG <= jar.tareG) {
    throw new ImpossibleEntry(
      'detail.grossG',
      'Tare and first mass of this jar are not on record, so the change cannot be computed. Enter it in percent.',
    )
  }
  if (grossG < jar.tareG) {
    throw new ImpossibleEntry(
      'detail.grossG',
      `The jar with its fill cannot weigh less than the empty jar, ${jar.tareG} g. Weigh it again.`,
    )
  }
  const value = computed(massChangePercent(jar.grossG, jar.tareG, grossG))
  if (value > attributeOf('mass').possible.upper) {
    throw new ImpossibleEntry(
      'detail.grossG',
      `A closed jar does not gain mass; it began at ${jar.grossG} g. Weigh it again.`,
    )
  }
  return { value, word: null, detail: entry.detail }
}

function wordValue(entry: TypedEntry, attribute: Attribute): EntryValue {
  const words = attribute.words ?? []
  const word = entry.detail.word ?? entry.typed
  const value = words.indexOf(word)
  if (value === -1) {
    throw new ImpossibleEntry('typed', `${attribute.label} is one of: ${words.join(', ')}. Choose one.`)
  }
  return { value, word, detail: entry.detail }
}

function rangeSentence({ key, label, unit, possible }: Attribute): string {
  if (key === 'viscosity') return 'Viscosity is always above 0 mPa·s; a reading of nothing is none.'
  return `${label} runs from ${possible.lower} to ${possible.upper}${unit ? ` ${unit}` : ''}.`
}

/** A point typed one place off is the usual slip: then a tenth of it lies close to the last value. */
function slipSentence(value: number, last: number | null): string {
  if (last === null || last <= 0) return 'Type it again.'
  const isSlip = Math.abs(value / 10 - last) < 0.2 * last
  return isSlip
    ? `The last was ${last}, so perhaps the point slipped.`
    : `The last was ${last}. Type it again.`
}

/** What was computed from typed numbers, without the noise of binary fractions: 0.9 of 60 mm is 1.5 %, not 1.4999999999999998. */
export function computed(value: number): number {
  return Number(value.toPrecision(12))
}
