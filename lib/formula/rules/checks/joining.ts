import type { CheckStep, Joining } from './check'

/** The step that brings two phases together says so: "B into A". */
export function findJoining(steps: readonly CheckStep[]): Joining | null {
  const index = steps.findIndex((step) => /\binto\b/i.test(step.phase))
  const found =
    index < 0 ? steps.findIndex((step) => /\b[A-Z]\d? into [A-Z]\b/.test(step.instruction)) : index
  const step = steps[found]
  if (!step) return null
  const said = index < 0 ? step.instruction : step.phase
  return { step, number: found + 1, added: /\b([A-Za-z0-9]+) into\b/i.exec(said)?.[1] ?? null }
}

/** Above this it is no stirring any more [practice]. */
const homogenisingRpm = 2000

/** Whether a step after the joining homogenises what is an emulsion already. */
export function isFinishing(step: CheckStep): boolean {
  return /homogeni[sz]/i.test(step.instruction) || (step.speedRpm ?? 0) > homogenisingRpm
}

/** The fastest stirring from the joining on, final homogenising left out: that is asked for itself. */
export function fastestFrom(
  steps: readonly CheckStep[],
  joining: Joining | null,
): { rpm: number; number: number } | null {
  const from = joining ? joining.number - 1 : steps.length
  const stirring = steps
    .map((step, index) => ({ step, number: index + 1 }))
    .slice(from)
    .filter(({ step, number }) => number === joining?.number || !isFinishing(step))
    .flatMap(({ step, number }) => (step.speedRpm === null ? [] : [{ rpm: step.speedRpm, number }]))
  return stirring.toSorted((a, b) => b.rpm - a.rpm)[0] ?? null
}

/** Steps that homogenise after the joining. */
export function finishingSteps(
  steps: readonly CheckStep[],
  joining: Joining | null,
): { step: CheckStep; number: number }[] {
  if (!joining) return []
  return steps
    .map((step, index) => ({ step, number: index + 1 }))
    .filter(({ step, number }) => number > joining.number && isFinishing(step))
}
