import { formulaLine, formulaStep, type FormulaLine, type FormulaStep } from '../schema'
import { moneyText, percentText } from './numbers'
import { readDecimal, readScaled } from '@/lib/number/rules'
import { remainderThousandths, type Amounts } from './totals'

// What stands in the fields while a formula is written: text as typed, read once, kept when it is wrong.

export type TypedLine = {
  id: string
  phase: string
  ingredientId: string | null
  inciName: string
  function: string
  percent: string
  density: string
  price: string
  isInternal: boolean
  isRemainder: boolean
}

export type TypedStep = {
  id: string
  phase: string
  instruction: string
  speed: string
  minutes: string
  temperature: string
  /** What tells by eye or hand that the step went well. */
  lookFor: string
  caution: string
}

export type LineErrors = Partial<Record<'inciName' | 'function' | 'percent' | 'density' | 'price', string>>
export type StepErrors = Partial<
  Record<'phase' | 'instruction' | 'speed' | 'minutes' | 'temperature' | 'lookFor' | 'caution', string>
>

export function typeLine(line: FormulaLine): TypedLine {
  const { id, phase, ingredientId, inciName, isInternal, isRemainder } = line
  const { percentThousandths, density, priceCentsPerKg } = line
  return {
    ...{ id, phase, ingredientId, inciName, isInternal, isRemainder },
    function: line.function,
    percent: percentText(percentThousandths),
    density: density.toFixed(Math.max(3, decimals(density))),
    price: priceCentsPerKg === null ? '' : moneyText(priceCentsPerKg),
  }
}

export function typeStep(step: FormulaStep): TypedStep {
  const text = (value: number | null) => (value === null ? '' : String(value))
  const { id, phase, instruction, lookFor, caution } = step
  return {
    ...{ id, phase, instruction, lookFor, caution },
    ...{ speed: text(step.speedRpm), minutes: text(step.minutes), temperature: text(step.temperatureC) },
  }
}

export function isBlankLine(line: TypedLine): boolean {
  return [line.inciName, line.function, line.percent, line.density, line.price].every((text) => !text.trim())
}

export function isBlankStep(step: TypedStep): boolean {
  const { phase, instruction, speed, minutes, temperature, lookFor, caution } = step
  return [phase, instruction, speed, minutes, temperature, lookFor, caution].every((text) => !text.trim())
}

/** The share of the "q.s. to 100" line: what the readable others leave. */
export function remainderOf(lines: readonly TypedLine[]): number {
  return remainderThousandths(
    lines
      .filter((line) => !line.isRemainder)
      .map((line) => ({ percentThousandths: readScaled(line.percent, 3) ?? 0 })),
  )
}

/** What can be drawn and added up already: lines with a readable share and density. */
export function readAmounts(
  lines: readonly TypedLine[],
): (Amounts & { id: string; phase: string; inciName: string; function: string })[] {
  const remainder = remainderOf(lines)
  return lines.flatMap((line) => {
    const percentThousandths = line.isRemainder ? remainder : readScaled(line.percent, 3)
    const density = readDecimal(line.density)
    if (percentThousandths === null || percentThousandths < 0 || density === null || density <= 0) return []
    const { id, phase, inciName, isInternal } = line
    const priceCentsPerKg = line.price.trim() ? readScaled(line.price, 2) : null
    return [
      {
        id,
        phase,
        inciName,
        function: line.function,
        isInternal,
        percentThousandths,
        density,
        priceCentsPerKg,
      },
    ]
  })
}

export function readLine(
  typed: TypedLine,
  remainder: number,
): { line: FormulaLine | null; errors: LineErrors } {
  const parsed = formulaLine.safeParse({
    ...typed,
    percentThousandths: typed.isRemainder ? remainder : readNumber(typed.percent, 3),
    density: readDecimal(typed.density),
    priceCentsPerKg: typed.price.trim() ? readNumber(typed.price, 2) : null,
  })
  if (parsed.success) return { line: parsed.data, errors: {} }
  const fields = { percentThousandths: 'percent', priceCentsPerKg: 'price' } as Record<
    string,
    keyof LineErrors
  >
  return { line: null, errors: byField<LineErrors>(parsed.error.issues, fields) }
}

export function readStep(typed: TypedStep): { step: FormulaStep | null; errors: StepErrors } {
  const number = (text: string) => (text.trim() ? (readDecimal(text) ?? text) : null)
  const parsed = formulaStep.safeParse({
    ...typed,
    speedRpm: number(typed.speed),
    minutes: number(typed.minutes),
    temperatureC: number(typed.temperature),
  })
  if (parsed.success) return { step: parsed.data, errors: {} }
  const fields = { speedRpm: 'speed', temperatureC: 'temperature' } as Record<string, keyof StepErrors>
  return { step: null, errors: byField<StepErrors>(parsed.error.issues, fields) }
}

/** Whole units where the text has no more decimals than that, else the unrounded number, which is refused. */
function readNumber(text: string, places: number): number | string {
  const scaled = readScaled(text, places)
  if (scaled !== null) return scaled
  const value = readDecimal(text)
  return value === null ? text : value * 10 ** places + 0.5 / 10 ** places
}

function byField<Errors>(
  issues: { path: PropertyKey[]; message: string }[],
  fields: Record<string, keyof Errors>,
) {
  const errors: Partial<Record<keyof Errors, string>> = {}
  for (const issue of issues) {
    const name = String(issue.path[0])
    const field = fields[name] ?? (name as keyof Errors)
    errors[field] ??= issue.message
  }
  return errors as Errors
}

function decimals(value: number): number {
  return Math.min(6, (String(value).split('.')[1] ?? '').length)
}
