import { readFileSync } from 'node:fs'
import path from 'node:path'
import { expect } from 'vitest'

/** Published or independently computed figures; each file names its source. */
export function reference<T>(name: string): T {
  const file = path.resolve(import.meta.dirname, '../../fixtures/reference', `${name}.json`)
  return JSON.parse(readFileSync(file, 'utf8')) as T
}

/** Agreement to so many significant digits of the reference. */
export function expectDigits(actual: number | null | undefined, expected: number, digits: number): void {
  expect(typeof actual).toBe('number')
  const error = Math.abs((actual as number) - expected) / (Math.abs(expected) || 1)
  expect(error, `${actual} against ${expected}`).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits))
}

/** Every figure that `expected` holds, to so many digits; the rest as it is. What it does not hold is not compared. */
export function expectFigures(actual: unknown, expected: unknown, digits: number, at = ''): void {
  if (typeof expected === 'number') {
    expect(typeof actual, at).toBe('number')
    const error = Math.abs((actual as number) - expected) / (Math.abs(expected) || 1)
    expect(error, `${at}: ${String(actual)} against ${expected}`).toBeLessThanOrEqual(
      0.5 * 10 ** (1 - digits),
    )
  } else if (expected !== null && typeof expected === 'object') {
    if (Array.isArray(expected)) expect(actual, at).toHaveLength(expected.length)
    for (const [key, value] of Object.entries(expected)) {
      expectFigures((actual as Record<string, unknown>)[key], value, digits, `${at}.${key}`)
    }
  } else {
    expect(actual, at).toBe(expected)
  }
}
