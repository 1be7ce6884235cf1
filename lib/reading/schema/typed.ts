/**
 * The number in what was typed, or null where it is none. Decimal comma and point are both read, so is an
 * exponent ("1.50E4"); spaces, also thin ones, group thousands. Two decimal signs are refused rather than guessed.
 */
export function readTyped(text: string): number | null {
  const bare = text.replace(/[\s\u00a0\u2009\u202f]/g, '').replace('\u2212', '-')
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d{1,3})?$/i.test(bare)) return null
  const value = Number(bare.replace(',', '.'))
  return Number.isFinite(value) ? value : null
}
