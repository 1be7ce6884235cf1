import { massChangePercent } from '@/lib/science/mass-change'
import { viscosity, viscosityFactor } from '@/lib/science/viscosity'
import { attributeOf, type Attribute } from '../schema/attributes'
import { readTyped } from '../schema/typed'
import { colourValue } from './colour-value'
import { dropletsValue } from './droplets-value'
import {
  computed,
  ImpossibleEntry,
  type EntryValue,
  type TypedEntry,
  type ValueContext,
} from './impossible-entry'
import { layersValue } from './layers-value'
import { centrifugeValue, typeValue } from './seen-value'

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
      return typeValue(entry, context)
    case 'colour':
      return colourValue(entry, context)
    case 'droplets':
      return dropletsValue(entry, context)
    case 'centrifuge':
      return centrifugeValue(entry, attribute, context)
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
