import { halfName } from './refusals'
import { orderOf, type CycleRecord } from './state'

type Times = { begunAt: string; endedAt?: string | undefined }

/** What is wrong with these times beside the halves before and after, by the field it is typed in; times are typed to the minute. */
export function misfits(
  { steps, presses }: Pick<CycleRecord, 'steps' | 'presses'>,
  half: { cycle: number; half: string },
  { begunAt, endedAt }: Times,
  now: string,
): Record<string, string> {
  const order = orderOf(half)
  const others = steps.filter((step) => orderOf(step) !== order)
  const begun = presses.filter(
    (press) => press.press === 'begin' && !steps.some((step) => orderOf(step) === orderOf(press)),
  )
  const before = others.find((step) => orderOf(step) < order && minute(step.endedAt) > minute(begunAt))
  const until = endedAt ?? now
  const after = [...others, ...begun.map(({ at, ...press }) => ({ ...press, begunAt: at }))].find(
    (one) => orderOf(one) > order && minute(one.begunAt) < minute(until),
  )
  const found: Record<string, string> = {}
  if (before) found['begunAt'] = `By then ${halfName(before)} had not ended. Correct the time.`
  if (after) found['endedAt'] = `Before that ${halfName(after)} had begun. Correct the time.`
  if (Date.parse(begunAt) > Date.parse(now)) found['begunAt'] = 'This time lies ahead.'
  if (endedAt !== undefined && Date.parse(endedAt) > Date.parse(now))
    found['endedAt'] = 'This time lies ahead.'
  return found
}

function minute(instant: string): number {
  return Math.floor(Date.parse(instant) / 60_000)
}
