import { isBeyond, minutesBetween } from '@/lib/science/making'

/** [practice] Further than this from what was prescribed, a step is explained. */
export const stepAllows = { percent: 10, minutes: 1, celsius: 2 }

export type Prescribed = { speedRpm: number | null; minutes: number | null; temperatureC: number | null }
export type Done = {
  actualSpeedRpm: number | null
  actualMinutes: number | null
  actualTemperatureC: number | null
}

/** Where a step was done otherwise than prescribed, each in a few words. What was not noted down is no deviation. */
export function deviations(asked: Prescribed, done: Done): string[] {
  const share = (value: number) => (value * stepAllows.percent) / 100
  const pairs = [
    ['rpm', asked.speedRpm, done.actualSpeedRpm, (value: number) => Math.max(1, share(value))],
    ['min', asked.minutes, done.actualMinutes, (value: number) => Math.max(stepAllows.minutes, share(value))],
    ['°C', asked.temperatureC, done.actualTemperatureC, () => stepAllows.celsius],
  ] as const
  return pairs.flatMap(([unit, wanted, actual, allowed]) =>
    wanted !== null && actual !== null && isBeyond(actual, wanted, allowed(wanted))
      ? [`${actual} ${unit} where ${wanted} ${unit} was prescribed`]
      : [],
  )
}

export type StepEntry = { kind: string; happenedAt: string }

/** When a step began and ended by the presses, newest counting, and the minutes between. */
export function stepTimes(entries: readonly StepEntry[]) {
  const startedAt = entries.findLast((entry) => entry.kind === 'start')?.happenedAt ?? null
  const ended = entries.findLast((entry) => entry.kind === 'end')?.happenedAt ?? null
  const endedAt = startedAt !== null && ended !== null && ended >= startedAt ? ended : null
  const minutes = startedAt && endedAt ? minutesBetween(Date.parse(startedAt), Date.parse(endedAt)) : null
  return { startedAt, endedAt, minutes }
}

/** What burns or breaks is said again where it is done, beside the step's own caution. */
export function stepCautions(step: { instruction: string; temperatureC: number | null; caution: string }) {
  const isHot = (step.temperatureC ?? 0) >= 45 && !/\bhot\b/i.test(step.caution)
  const isGlass = /\b(glass|beaker)\b/i.test(step.instruction) && !/\bglass\b/i.test(step.caution)
  return [
    step.caution,
    isHot ? `Hot, ${step.temperatureC} °C: gloves and eye protection.` : '',
    isGlass ? 'Glass: look for cracks before it is heated or stirred.' : '',
  ].filter(Boolean)
}
