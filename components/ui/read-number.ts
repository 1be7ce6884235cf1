/**
 * The number in a typed text, or null when it is none. A decimal comma and a decimal point are both read;
 * spaces (also the thin ones) between digits group thousands. Two separators are refused rather than guessed.
 */
export function readNumber(text: string): number | null {
  const bare = text.replace(/[\s\u00a0\u2009\u202f]/g, '').replace('\u2212', '-')
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(bare)) return null
  return Number(bare.replace(',', '.'))
}
