import type { IngredientFacts } from '@/lib/ingredient/queries'
import type { EmulsionType, FormulaLine, FormulaStep } from '../../schema'
import { percentText } from '../numbers'
import type { TargetPh } from '../target-ph'

export const checkKeys = [
  ...(['polymer', 'gel', 'slow', 'shear', 'cold', 'thick', 'salt', 'holds', 'agree', 'neutral'] as const),
  ...(['finish', 'preservative', 'ph', 'melt', 'range', 'density'] as const),
] as const
export type CheckKey = (typeof checkKeys)[number]

export type CheckLine = Pick<
  FormulaLine,
  'id' | 'phase' | 'inciName' | 'function' | 'percentThousandths' | 'isInternal'
> &
  // A line that is only added up has neither.
  Partial<Pick<FormulaLine, 'ingredientId' | 'isRemainder'>> & {
    /** Null while none can be read. */
    density: number | null
  }
export type CheckStep = Pick<FormulaStep, 'phase' | 'instruction' | 'speedRpm' | 'minutes' | 'temperatureC'>

/** A batch of any version that came out as the emulsion it should be: what it went through, it bore. */
export type BorneBatch = { code: string; addedPercent: number | null; steps: CheckStep[] }

export type GivenAnswer = {
  question: string
  kind: 'answered' | 'set aside'
  note: string
  askedAbout: string
  /** The version it was given on. */
  number: number
  by: string
  at: string
}

/** What is known beside the formula's own lines and steps. */
export type Ground = { facts: Record<string, IngredientFacts>; borne: BorneBatch[]; answers: GivenAnswer[] }
export const noGround: Ground = { facts: {}, borne: [], answers: [] }

/** A formula as the questions see it. */
export type Asked = {
  type: EmulsionType
  isWaterInside: boolean
  lines: readonly CheckLine[]
  inWater: readonly CheckLine[]
  inOil: readonly CheckLine[]
  steps: readonly CheckStep[]
  joining: Joining | null
  internalVolumePercent: number | null
  factsOf: (line: CheckLine) => IngredientFacts | null
  borne: readonly BorneBatch[]
  targetPh: TargetPh | null
}
export type Joining = { step: CheckStep; number: number; added: string | null }

/** What a rule says: a question with its reason, never a recipe. */
export type Question = {
  key: CheckKey
  question: string
  answer: string
  /** Open means: the formula itself does not answer it. */
  isOpen: boolean
  reason: string
  /** Where the reason is from: practice, from memory, or a source of the book. */
  mark: string
  /** What of the drawing it points at. */
  at: 'film' | 'drop' | null
  /** The lines and the numbers of the steps that it is about. */
  lines: readonly CheckLine[]
  steps: readonly number[]
  /** Figures beside these on which it rests. */
  figures?: readonly (string | number | null)[]
}

export const share = (line: CheckLine) => `${percentText(line.percentThousandths)} %`
export const named = (line: CheckLine) => `${line.inciName}, ${share(line)}`

/** The first three, and how many more. */
export function several(parts: readonly string[]): string {
  const shown = parts.slice(0, 3).join('; ')
  return parts.length > 3 ? `${shown}; and ${parts.length - 3} more` : shown
}

/** "from memory" where every figure is, else each source once. */
export function sourceOf(sources: readonly string[]): string {
  return [...new Set(sources)].join(', ')
}

/** All steps, where a question is about what none of them says. */
export const everyStep = (steps: readonly CheckStep[]) => steps.map((_, index) => index + 1)

/**
 * What a question rests on, as text: an answer holds as long as this stays the same. Order of lines and numbers of
 * steps are left out, because moving them changes nothing that was asked.
 */
export function askedAbout(asked: Asked, question: Question): string {
  const lines = question.lines
    .map((line) => [line.inciName.toLowerCase(), line.function, line.percentThousandths, line.isInternal])
    .toSorted(([a], [b]) => (String(a) < String(b) ? -1 : 1))
  const steps = question.steps.map((number) => {
    const step = asked.steps[number - 1]
    return step ? [step.phase, step.instruction, step.speedRpm, step.minutes, step.temperatureC] : []
  })
  return JSON.stringify([asked.type, lines, steps, question.figures ?? []])
}
