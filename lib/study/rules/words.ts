import type { Attribute } from '@/lib/reading/schema/attributes'
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

/** What a value is written by: an attribute, or whatever carries as much of one. */
export type Written = {
  unit: string
  decimals: Attribute['decimals']
  words?: readonly string[] | null | undefined
}

/** A value with the figures its attribute is worth, and a true minus; without its unit. */
export function shownValue({ decimals, words }: Written, value: number): string {
  if (words) return words[Math.round(value)] ?? String(value)
  const text = decimals === 'three figures' ? threeFigures(value) : value.toFixed(decimals)
  return thousands(text.replace(/^-(0\.0*)$/, '$1').replace('-', '−'))
}

export function shownWithUnit(attribute: Written, value: number): string {
  const shown = shownValue(attribute, value)
  return attribute.unit && !attribute.words ? `${shown} ${attribute.unit}` : shown
}

function threeFigures(value: number): string {
  if (value === 0) return '0'
  const text = value.toPrecision(3)
  return text.includes('e') ? String(Number(text)) : text
}
