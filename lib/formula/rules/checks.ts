import type { EmulsionType, FormulaLine, FormulaStep } from '../schema'
import { percentText } from './numbers'

export type FormulaCheck = {
  key: 'polymer' | 'salt' | 'gel' | 'agree' | 'slow' | 'shear' | 'cold'
  question: string
  answer: string
  /** Open means: the formula itself does not answer it yet. A question, never a rule. */
  isOpen: boolean
  reason: string
}

type Line = Pick<FormulaLine, 'inciName' | 'function' | 'percentThousandths' | 'isInternal'>
type Step = Pick<FormulaStep, 'phase' | 'instruction' | 'speedRpm' | 'minutes' | 'temperatureC'>

/** [practice] Above these the question is asked again with the number in it; nothing is refused. */
const gentleRpm = 600
const coldC = 40

/** Questions with a reason each, answered from the formula's own lines and steps. */
export function formulaChecks(
  type: EmulsionType,
  lines: readonly Line[],
  steps: readonly Step[],
): FormulaCheck[] {
  const used = lines.filter((line) => line.percentThousandths > 0)
  const waterInside = type !== 'oil-in-water'
  const inWater = used.filter((line) => line.isInternal === waterInside)
  const inOil = used.filter((line) => line.isInternal !== waterInside)
  const salt = inWater.filter((line) => /electrolyte|salt/i.test(line.function))
  const gel = inWater.filter((line) => /gel|thicken/i.test(line.function))
  const joining = findJoining(steps)
  const checks = [agreeCheck(salt, gel), shearCheck(steps, joining)]
  if (!waterInside) return checks
  return [
    polymerCheck(inOil),
    saltCheck(salt),
    gelCheck(gel),
    ...checks.slice(0, 1),
    slowCheck(joining),
    ...checks.slice(1),
    coldCheck(joining),
  ]
}

/** The step that brings two phases together says so: "B into A". */
export function findJoining(steps: readonly Step[]): { step: Step; number: number } | null {
  const index = steps.findIndex((step) => /\binto\b/i.test(step.phase))
  const found =
    index < 0 ? steps.findIndex((step) => /\b[A-Z]\d? into [A-Z]\b/.test(step.instruction)) : index
  const step = steps[found]
  return step ? { step, number: found + 1 } : null
}

function polymerCheck(inOil: readonly Line[]): FormulaCheck {
  const polymer = inOil.find((line) => /polymer/i.test(line.function))
  const thick = inOil.find((line) => /thicken/i.test(line.function))
  return {
    key: 'polymer',
    question: 'Is a polymer in the oil?',
    answer: polymer
      ? `Yes, ${share(polymer)}.`
      : `Open: no line of the oil is a polymeric emulsifier${thick ? `, ${thick.inciName} only thickens` : ''}.`,
    isOpen: !polymer,
    reason: 'Its coat keeps a thin film from being squeezed out.',
  }
}

function saltCheck(salt: readonly Line[]): FormulaCheck {
  return {
    key: 'salt',
    question: 'Is there salt in the water?',
    answer: salt[0] ? `Yes, ${named(salt[0])}.` : 'Open: no line of the water is an electrolyte.',
    isOpen: !salt.length,
    reason: 'Salt holds the water in each drop, so that large drops do not grow at the cost of small ones.',
  }
}

function gelCheck(gel: readonly Line[]): FormulaCheck {
  return {
    key: 'gel',
    question: 'Is the water gelled first?',
    answer: gel[0] ? `Yes, ${named(gel[0])}.` : 'Open: no line gels the water.',
    isOpen: !gel.length,
    reason: 'Stiff water lets a torn film close again.',
  }
}

/** Charged acrylic thickeners lose their swelling to salt; the common gums bear it [practice]. */
function agreeCheck(salt: readonly Line[], gel: readonly Line[]): FormulaCheck {
  const shy = gel.find((line) => /carbomer|acrylate|acryloyl/i.test(line.inciName))
  const clash = salt[0] && shy
  return {
    key: 'agree',
    question: 'Do salt and gelling polymer agree?',
    answer: clash
      ? `Open: ${shy.inciName} thins where ${salt[0]?.inciName} is.`
      : salt[0] && gel[0]
        ? `Yes, nothing known against ${gel[0].inciName} with salt.`
        : 'Nothing to disagree: not both are in it.',
    isOpen: Boolean(clash),
    reason: 'A charged polymer coils up in salt water, and the gel is gone.',
  }
}

function slowCheck(joining: { step: Step; number: number } | null): FormulaCheck {
  const minutes = joining?.step.minutes
  return {
    key: 'slow',
    question: 'Does water go in slowly?',
    answer: !joining
      ? 'Open: no step says which phase goes into which, such as B into A.'
      : minutes
        ? `Yes, over ${minutes} min in step ${joining.number}.`
        : `Open: step ${joining.number} has no minutes.`,
    isOpen: !minutes,
    reason: 'Faster than oil can wrap it, the emulsion inverts.',
  }
}

function shearCheck(steps: readonly Step[], joining: { step: Step; number: number } | null): FormulaCheck {
  const from = joining ? joining.number - 1 : steps.length
  const fastest = steps
    .map((step, index) => ({ rpm: step.speedRpm, number: index + 1 }))
    .slice(from)
    .filter((step): step is { rpm: number; number: number } => step.rpm !== null)
    .sort((a, b) => b.rpm - a.rpm)[0]
  const isFast = fastest !== undefined && fastest.rpm > gentleRpm
  return {
    key: 'shear',
    question: 'Is the shear one that it can bear?',
    answer: !joining
      ? 'Open: no step says which phase goes into which.'
      : !fastest
        ? `Open: step ${joining.number} has no speed.`
        : isFast
          ? `Open: ${fastest.rpm} rpm in step ${fastest.number}; has a batch borne it?`
          : `Yes, at most ${fastest.rpm} rpm from step ${joining.number} on.`,
    isOpen: !fastest || isFast,
    reason: 'Packed drops cannot slip past; fast blades tear.',
  }
}

function coldCheck(joining: { step: Step; number: number } | null): FormulaCheck {
  const at = joining?.step.temperatureC ?? null
  return {
    key: 'cold',
    question: 'Is it cold enough?',
    answer: !joining
      ? 'Open: no step says which phase goes into which.'
      : at === null
        ? `Open: step ${joining.number} has no temperature.`
        : at > coldC
          ? `Open: ${at} °C in step ${joining.number}, above ${coldC} °C.`
          : `Yes, ${at} °C; limit ${coldC} °C.`,
    isOpen: at === null || at > coldC,
    reason: 'Warm oil is thin, and its films drain.',
  }
}

const share = (line: Line) => `${percentText(line.percentThousandths)} %`
const named = (line: Line) => `${line.inciName}, ${share(line)}`
