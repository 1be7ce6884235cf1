import { ScienceError } from '../guard'

/**
 * Reads a calculation's JSON input field by field. Every refusal is a ScienceError that names the field; a field
 * that no calculation knows is refused too, because a misspelt option would otherwise be ignored in silence.
 */
export type Fields = {
  path: string
  values: Record<string, unknown>
}

export function fieldsOf(raw: unknown, path: string, known: readonly string[]): Fields {
  if (raw === null || typeof raw !== 'object' || Array.isArray(raw)) {
    throw new ScienceError(path || 'input', `must be an object, not ${kindOf(raw)}`)
  }
  for (const key of Object.keys(raw)) {
    if (!known.includes(key)) {
      throw new ScienceError(
        join(path, /^\w{1,30}$/.test(key) ? key : quoted(key)),
        `is not a field here; known are ${known.join(', ')}`,
      )
    }
  }
  return { path, values: raw as Record<string, unknown> }
}

export function number(fields: Fields, key: string): number {
  return asNumber(required(fields, key), join(fields.path, key))
}

export function optionalNumber(fields: Fields, key: string): number | undefined {
  return has(fields, key) ? number(fields, key) : undefined
}

export function flag(fields: Fields, key: string): boolean {
  const value = required(fields, key)
  if (typeof value !== 'boolean') {
    throw new ScienceError(join(fields.path, key), `must be true or false, not ${kindOf(value)}`)
  }
  return value
}

export function optionalFlag(fields: Fields, key: string): boolean | undefined {
  return has(fields, key) ? flag(fields, key) : undefined
}

export function text(fields: Fields, key: string): string {
  const value = required(fields, key)
  if (typeof value !== 'string')
    throw new ScienceError(join(fields.path, key), `must be text, not ${kindOf(value)}`)
  return value
}

export function choice<T extends string>(fields: Fields, key: string, allowed: readonly T[]): T {
  const value = text(fields, key)
  const found = allowed.find((option) => option === value)
  if (found === undefined) {
    throw new ScienceError(
      join(fields.path, key),
      `must be one of ${allowed.join(', ')}, not ${quoted(value)}`,
    )
  }
  return found
}

export function numbers(fields: Fields, key: string): number[] {
  return list(fields, key, asNumber)
}

export function optionalNumbers(fields: Fields, key: string): number[] | undefined {
  return has(fields, key) ? numbers(fields, key) : undefined
}

/** Every entry a number, or an array of replicates. */
export function replicates(fields: Fields, key: string): number[][] {
  return list(fields, key, asReplicates)
}

export function optionalReplicate(fields: Fields, key: string): number[] | undefined {
  return has(fields, key) ? asReplicates(required(fields, key), join(fields.path, key)) : undefined
}

export function list<T>(fields: Fields, key: string, item: (raw: unknown, path: string) => T): T[] {
  const path = join(fields.path, key)
  const value = required(fields, key)
  if (!Array.isArray(value)) throw new ScienceError(path, `must be a list, not ${kindOf(value)}`)
  return value.map((entry: unknown, i) => item(entry, `${path}[${i}]`))
}

export function object(fields: Fields, key: string, known: readonly string[]): Fields {
  return fieldsOf(required(fields, key), join(fields.path, key), known)
}

export function has(fields: Fields, key: string): boolean {
  return fields.values[key] !== undefined
}

/** Leaves fields out that were not given, so that defaults hold. */
export function given<T extends object>(fields: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>
  }
}

function asReplicates(raw: unknown, path: string): number[] {
  if (!Array.isArray(raw)) return [asNumber(raw, path)]
  if (raw.length === 0) throw new ScienceError(path, 'is an empty list of replicates')
  return raw.map((entry: unknown, i) => asNumber(entry, `${path}[${i}]`))
}

function asNumber(raw: unknown, path: string): number {
  if (typeof raw !== 'number') throw new ScienceError(path, `must be a number, not ${kindOf(raw)}`)
  if (!Number.isFinite(raw)) throw new ScienceError(path, 'is not a finite number')
  return raw
}

function required(fields: Fields, key: string): unknown {
  const value = fields.values[key]
  if (value === undefined) throw new ScienceError(join(fields.path, key), 'is missing')
  return value
}

function join(path: string, key: string): string {
  return path === '' ? key : `${path}.${key}`
}

function kindOf(raw: unknown): string {
  if (raw === null) return 'null'
  if (Array.isArray(raw)) return 'a list'
  if (typeof raw === 'string') return `the text ${quoted(raw)}`
  if (typeof raw === 'object') return 'an object'
  return String(raw)
}

function quoted(raw: string): string {
  return JSON.stringify(raw.length > 30 ? `${raw.slice(0, 30)}…` : raw)
}
