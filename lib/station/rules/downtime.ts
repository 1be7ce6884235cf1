import { spokenDay } from '@/lib/study/rules/calendar'

export type Period = { fromOn: string; toOn: string }

export function touches({ fromOn, toOn }: Period, day: string): boolean {
  return day >= fromOn && day <= toOn
}

/** "from 3 to 5 Mar 2026", "on 3 Mar 2026". */
export function periodText({ fromOn, toOn }: Period): string {
  if (fromOn === toOn) return `on ${spokenDay(fromOn)}`
  const isSameYear = fromOn.slice(0, 4) === toOn.slice(0, 4)
  const isSameMonth = fromOn.slice(0, 7) === toOn.slice(0, 7)
  const from = isSameMonth ? String(Number(fromOn.slice(8))) : spokenDay(fromOn, !isSameYear)
  return `from ${from} to ${spokenDay(toOn)}`
}

/** "from 3 to 5 Mar 2026 (the fan is replaced)". */
export function downtimeText({ reason, ...period }: Period & { reason: string }): string {
  return `${periodText(period)} (${reason.replace(/\.$/, '')})`
}

/** Whether a pull can still be taken on a day of its own window before or after; null where it does not fall in. */
export function pullInDowntime(
  period: Period,
  pull: { dueOn: string; windowFrom: string; windowTo: string },
): { isMovable: boolean; sentence: string } | null {
  if (!touches(period, pull.dueOn)) return null
  if (pull.windowFrom < period.fromOn)
    return { isMovable: true, sentence: `can be pulled before, from ${spokenDay(pull.windowFrom)}` }
  if (pull.windowTo > period.toOn)
    return { isMovable: true, sentence: `can be pulled after, until ${spokenDay(pull.windowTo)}` }
  return { isMovable: false, sentence: 'its whole window falls in: move the jars, or the days' }
}
