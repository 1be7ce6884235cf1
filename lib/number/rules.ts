import { thousands } from '@/lib/science/methods/thousands'

/**
 * Reads a number as people type it: decimal comma or point, spaces and thin gaps as thousands.
 * Null for anything else; text with both signs is not guessed at.
 */
export function readDecimal(typed: string): number | null {
  const plain = typed.replace(/[\s\u2009\u202f\u00a0]/g, '').replace('\u2212', '-')
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(plain)) return null
  return Number(plain.replace(',', '.'))
}

/** What is typed as it is sent: the number in it, nothing where nothing stands; what cannot be read goes as it is and is refused by name. */
export function readTyped(typed: string): number | string | null {
  return typed.trim() === '' ? null : (readDecimal(typed) ?? typed)
}

/** Whole units of 10^-places, exact where the text has at most that many decimals, else null. */
export function readScaled(typed: string, places: number): number | null {
  const value = readDecimal(typed)
  if (value === null) return null
  const decimals = /[.,](\d*)\s*$/.exec(typed)?.[1]?.replace(/0+$/, '') ?? ''
  return decimals.length > places ? null : Math.round(value * 10 ** places)
}

/** A number with so many decimals, its thousands and a true minus; what rounds to nothing has none. */
export function grouped(value: number, places: number): string {
  const digits = Math.abs(value).toFixed(places)
  return `${value < 0 && Number(digits) !== 0 ? '\u2212' : ''}${thousands(digits)}`
}
