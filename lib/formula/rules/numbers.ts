/**
 * Reads a number as people type it: decimal comma or point, spaces and thin gaps as thousands.
 * Null for anything else; text with both signs is not guessed at.
 */
export function readDecimal(typed: string): number | null {
  const plain = typed.replace(/[\s\u2009\u202f\u00a0]/g, '').replace('\u2212', '-')
  if (!/^-?(\d+([.,]\d*)?|[.,]\d+)$/.test(plain)) return null
  return Number(plain.replace(',', '.'))
}

/** Whole units of 10^-places, exact where the text has at most that many decimals, else null. */
export function readScaled(typed: string, places: number): number | null {
  const value = readDecimal(typed)
  if (value === null) return null
  const decimals = /[.,](\d*)\s*$/.exec(typed)?.[1]?.replace(/0+$/, '') ?? ''
  return decimals.length > places ? null : Math.round(value * 10 ** places)
}

/** 2400 -> "2.40", 2405 -> "2.405". */
export function percentText(thousandths: number): string {
  return (thousandths / 1000).toFixed(thousandths % 10 === 0 ? 2 : 3)
}

/** Thousands with a thin gap, as everywhere on screen. */
export function grouped(value: number, places: number): string {
  const [whole = '', decimals] = Math.abs(value).toFixed(places).split('.')
  const gapped = whole.replace(/\B(?=(\d{3})+$)/g, '\u2009')
  return `${value < 0 ? '\u2212' : ''}${gapped}${decimals ? `.${decimals}` : ''}`
}

export function moneyText(cents: number): string {
  return grouped(cents / 100, 2)
}
