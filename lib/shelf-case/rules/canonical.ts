/**
 * Canonical JSON as in RFC 8785: members sorted by UTF-16 code units, numbers and strings as ECMAScript
 * writes them, no white space. Two equal contents give the same bytes, so their SHA-256 can be compared.
 *
 * Throws on what JSON cannot hold (undefined members, NaN, infinities), since dropping them silently would
 * let two different contents share one hash.
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new Error('A number that is not finite cannot be frozen.')
    return JSON.stringify(value)
  }
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`
  if (typeof value === 'object') {
    const members = Object.entries(value)
      .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
      .map(([key, member]) => `${JSON.stringify(key)}:${canonicalJson(member)}`)
    return `{${members.join(',')}}`
  }
  throw new Error(`A value of type ${typeof value} cannot be frozen.`)
}
