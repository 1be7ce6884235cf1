import { thousands } from './thousands'

/** How far a fact may be leant on, as design and code mark it: [std], [book], [practice], [memory]. */
export type Mark = 'standard' | 'handbook' | 'practice' | 'memory'

/** The marks in words, as every figure's details say them. */
export const markWords: Record<Mark, string> = {
  standard: 'published standard',
  handbook: 'handbook',
  practice: 'common practice, no source',
  memory: 'from memory, to be confirmed before use at work',
}

export type Source = { text: string; mark: Mark }

/** One thing that goes into a figure, with its unit. */
export type MethodInput = { key: string; says: string; unit: string }

/** What a computed quantity is, how it is computed, from what, and where that comes from. */
export type Method = {
  name: string
  /** The formula in readable text, a line each. */
  formula: readonly string[]
  inputs: readonly MethodInput[]
  sources: readonly Source[]
  /** The topic of `calc` that makes it again; null where it is plain arithmetic of what is shown. */
  topic: string | null
}

/** A figure's own details: the method with the values that went into this very figure. */
export type FigureFacts = {
  name: string
  /** In full precision, with its unit. */
  result: string
  formula: readonly string[]
  inputs: readonly { says: string; value: string }[]
  sources: readonly Source[]
  /** When it was computed, or the version that it is of; empty where it is computed as one looks. */
  when: string
  recheck: { topic: string; input: unknown } | null
}

export type Values = Record<string, number | string | null | undefined>

type Own = {
  name?: string
  result: string
  /** Lines of the method's formula that say this figure; all of them if left out. */
  lines?: readonly number[]
  /** By the method's keys; what is left out or null is not shown. */
  values: Values
  /** Further rows of this figure alone. */
  more?: readonly { says: string; value: string }[]
  when?: string
  /** Exactly what `calc` takes. */
  input?: unknown
}

export function factsOf(
  method: Method,
  { name, result, lines, values, more = [], when = '', input }: Own,
): FigureFacts {
  return {
    name: name ?? method.name,
    result,
    formula: lines ? method.formula.filter((_, index) => lines.includes(index)) : method.formula,
    inputs: [
      ...method.inputs.flatMap(({ key, says, unit }) => {
        const value = values[key]
        if (value === undefined || value === null) return []
        return [{ says, value: typeof value === 'number' ? exactly(value, unit) : value }]
      }),
      ...more,
    ],
    sources: method.sources,
    when,
    recheck: method.topic !== null && input !== undefined ? { topic: method.topic, input } : null,
  }
}

/** Every digit that the number has, thousands with a thin gap, a true minus, its unit behind it. */
export function exactly(value: number, unit = ''): string {
  const [mantissa = '', exponent] = String(Math.abs(value)).split('e')
  const power =
    exponent === undefined ? '' : ` × 10 to the power ${exponent.replace('-', '\u2212').replace('+', '')}`
  return `${value < 0 ? '\u2212' : ''}${thousands(mantissa)}${power}${unit === '' ? '' : ` ${unit}`}`
}
