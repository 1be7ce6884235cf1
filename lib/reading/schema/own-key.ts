/** A protocol's own attribute is called by its key: "own.Foam-height" is foam height wherever it is named. */
export type OwnKey = `own.${string}`

const keyPattern = /^own\.[\p{L}\d]+(-[\p{L}\d]+)*$/u

export function isOwnKey(key: unknown): key is OwnKey {
  return typeof key === 'string' && key.length <= 44 && keyPattern.test(key)
}

export function isOwn(key: string): key is OwnKey {
  return key.startsWith('own.')
}

/** The key of a name as it was typed, or null where it has other signs than letters, digits and spaces. */
export function ownKeyOf(name: string): OwnKey | null {
  const key = `own.${name.trim().replace(/\s+/g, '-')}`
  return isOwnKey(key) ? key : null
}

export function ownName(key: string): string {
  const name = key.replace(/^own\./, '').replaceAll('-', ' ')
  return name.charAt(0).toUpperCase() + name.slice(1)
}
