/**
 * A calculation that cannot be made, with the input field that prevents it. Callers show `message` as it is.
 */
export class ScienceError extends Error {
  readonly field: string
  constructor(field: string, problem: string) {
    super(`${field}: ${problem}`)
    this.name = 'ScienceError'
    this.field = field
  }
}

export function assertFinite(field: string, value: unknown): asserts value is number {
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    throw new ScienceError(field, 'is not a finite number')
  }
}

export function assertPositive(field: string, value: unknown): asserts value is number {
  assertFinite(field, value)
  if (value <= 0) throw new ScienceError(field, `must be above 0, not ${value}`)
}

export function assertNotNegative(field: string, value: unknown): asserts value is number {
  assertFinite(field, value)
  if (value < 0) throw new ScienceError(field, `must not be negative, but is ${value}`)
}

export function assertNumbers(field: string, values: readonly number[], least: number): void {
  // Means are taken by the million: a field's name is only spelled out where it is needed.
  for (let i = 0; i < values.length; i++) {
    if (!Number.isFinite(values[i])) assertFinite(`${field}[${i}]`, values[i])
  }
  if (values.length < least) {
    throw new ScienceError(
      field,
      `needs at least ${least} ${least === 1 ? 'value' : 'values'}, has ${values.length}`,
    )
  }
}

export function assertSameLength(
  fieldA: string,
  a: readonly unknown[],
  fieldB: string,
  b: readonly unknown[],
): void {
  if (a.length !== b.length) {
    throw new ScienceError(
      fieldB,
      `has ${b.length} ${b.length === 1 ? 'value' : 'values'}, but ${fieldA} has ${a.length}`,
    )
  }
}

/** Throws where a result overflowed: absurdly large input must never end as Infinity or NaN in an answer. */
export function assertComputable<T>(field: string, result: T): T {
  if (!isFiniteThroughout(result))
    throw new ScienceError(field, 'holds numbers too large or too small to compute with')
  return result
}

export function isFiniteThroughout(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  if (typeof value !== 'object' || value === null) return true
  if (Array.isArray(value)) return value.every(isFiniteThroughout)
  const fields = value as Record<string, unknown>
  for (const key in fields) if (!isFiniteThroughout(fields[key])) return false
  return true
}
