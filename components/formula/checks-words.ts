import type { FormulaCheck } from '@/lib/formula/rules/checks'
import type { GivenAnswer } from '@/lib/formula/rules/checks/check'
import { spokenDay } from '@/lib/study/rules/calendar'
import { listed } from '@/lib/study/rules/words'

/** Under the question: the formula's own answer, a person's, or that it waits; cut where there is little room. */
export function answerText(check: FormulaCheck, most = Infinity): string {
  const { given, isAsked, isOpen, isReopened, answer } = check
  if (given && isAsked && !isOpen) {
    return cut(`${given.kind === 'answered' ? 'Answered' : 'Set aside'} by ${given.by}: ${given.note}`, most)
  }
  return cut(isReopened ? `${answer} Answered before, but changed since.` : answer, most)
}

function cut(text: string, most: number): string {
  const whole = withUnits(text)
  return whole.length > most ? `${whole.slice(0, most - 1).trimEnd()}…` : whole
}

/** A number stays on the line of its unit. */
export function withUnits(text: string): string {
  return text.replace(/(\d) (%|°C|rpm|min|g\/mL)/g, '$1\u00a0$2')
}

export function givenText(given: GivenAnswer): string {
  return `${given.by}, ${spokenDay(given.at.slice(0, 10))}, ${given.kind}: ${given.note}`
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
