import type { FormulaCheck } from '@/lib/formula/rules/checks'
import type { GivenAnswer } from '@/lib/formula/rules/checks/check'
import { spokenDay } from '@/lib/study/rules/calendar'
import { listed } from '@/lib/study/rules/words'

/** Under the question: the formula's own answer, a person's, or that it waits; cut where there is little room. */
export function answerText(check: FormulaCheck, number: number, most = Infinity): string {
  const { given, isAsked, isOpen, isReopened, answer } = check
  if (given && isAsked && !isOpen) {
    const how = given.kind === 'answered' ? 'Answered' : 'Set aside'
    return cut(`${how}${earlier(given, number)} by ${given.by}: ${given.note}`, most)
  }
  return cut(isReopened ? `${answer} Answered before, but changed since.` : answer, most)
}

/** Of an answer that was given on an earlier version and still holds. */
const earlier = (given: GivenAnswer, number: number) =>
  given.number === number ? '' : ` on version ${given.number}`

function cut(text: string, most: number): string {
  const whole = withUnits(text)
  return whole.length > most ? `${whole.slice(0, most - 1).trimEnd()}…` : whole
}

/** A number stays on the line of its unit. */
export function withUnits(text: string): string {
  return text.replace(/(\d) (%|°C|rpm|min|g\/mL)/g, '$1\u00a0$2')
}

export function givenText(given: GivenAnswer, number: number): string {
  return `${given.by}, ${spokenDay(given.at.slice(0, 10))}, ${given.kind}${earlier(given, number)}: ${given.note}`
}

/** Which lines and steps it is about; many of them are counted. */
export function aboutText({ lines, steps }: Pick<FormulaCheck, 'lines' | 'steps'>): string {
  const named = lines.length > 4 ? [`${lines.length} lines`] : lines.map((line) => line.name)
  const numbers =
    steps.length > 4
      ? [`${steps.length} steps`]
      : steps.length
        ? [`step${steps.length > 1 ? 's' : ''} ${listed(steps.map(String))}`]
        : []
  const parts = [...named, ...numbers]
  return parts.length ? `About ${listed(parts)}.` : ''
}
