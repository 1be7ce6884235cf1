import { attributes, type AttributeKey } from '@/lib/reading/schema/attributes'
import { thousands } from '@/lib/science/methods/thousands'

const small = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
]

/** Up to twelve in words, as one speaks. */
export function numberWord(count: number): string {
  return small[count] ?? thousands(String(count))
}

/** A sentence begins with a capital. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** "40 °C (inverted)": what sets a station's jars apart stands with its name. */
export function withVariant(name: string, variant: string | undefined): string {
  return variant ? `${name} (${variant})` : name
}

export function counted(count: number, one: string, many = `${one}s`): string {
  return `${numberWord(count)} ${count === 1 ? one : many}`
}

export function listed(items: string[]): string {
  return items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`
}

/** A value with the figures its attribute is worth, and a true minus; without its unit. */
export function shownValue(attribute: string, value: number): string {
  const known = attributes[attribute as AttributeKey]
  if (!known) return String(value)
  if ('words' in known) return known.words[Math.round(value)] ?? String(value)
  const text = known.decimals === 'three figures' ? threeFigures(value) : value.toFixed(known.decimals)
  return thousands(text.replace(/^-(0\.0*)$/, '$1').replace('-', '−'))
}

export function shownWithUnit(attribute: string, value: number): string {
  const known = attributes[attribute as AttributeKey]
  const shown = shownValue(attribute, value)
  return known?.unit && !('words' in known) ? `${shown} ${known.unit}` : shown
}

/** Read in words against the initial, so it has neither a curve nor a distance. */
export function isWorded(attribute: string): boolean {
  return attributes[attribute as AttributeKey]?.kind === 'word'
}

function threeFigures(value: number): string {
  if (value === 0) return '0'
  const text = value.toPrecision(3)
  return text.includes('e') ? String(Number(text)) : text
}
