/** The digits of a number with a thin gap at its thousands, from 1 000 on, wherever a number is shown. */
export function thousands(digits: string): string {
  const [whole = '', decimals] = digits.split('.')
  const gapped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, '\u2009')
  return decimals === undefined ? gapped : `${gapped}.${decimals}`
}
