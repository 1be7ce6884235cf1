import type { BoardPress, BoardStep } from '../queries/board'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { celsius } from './shortfall'

type Clock = { now: string; zone: string }

/** "16:00", and the day where it is another than today, the year where it is another than this. */
export function whenText(instant: string, now: string, zone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone: zone, timeStyle: 'short' }).format(
    new Date(instant),
  )
  const day = dayIn(zone, instant)
  const today = dayIn(zone, now)
  return day === today ? time : `${spokenDay(day, day.slice(0, 4) !== today.slice(0, 4))}, ${time}`
}

export function hoursText(hours: number): string {
  return hours < 1 ? `${Math.max(0, Math.round(hours * 60))} min` : `${hours.toFixed(1)} h`
}

export function hoursOf({ begunAt, endedAt }: { begunAt: string; endedAt: string }): number {
  return (Date.parse(endedAt) - Date.parse(begunAt)) / 3_600_000
}

type Half = Pick<
  BoardStep,
  'begunAt' | 'endedAt' | 'reachedC' | 'coreC' | 'isFrozenThrough' | 'heldHours' | 'heldReason' | 'note'
>

/** A half as it was typed: when, what was reached, how it was held. */
export function stepLines(step: Half & { isVoid?: boolean }, { now, zone }: Clock): string[] {
  if (step.isVoid) return ['taken back']
  const { reachedC, coreC, isFrozenThrough, heldHours, heldReason, note } = step
  const reached = [
    reachedC === null ? null : `reached ${celsius(reachedC)}`,
    coreC === null ? null : `core ${celsius(coreC)}`,
    isFrozenThrough === null ? null : isFrozenThrough ? 'frozen through' : 'not frozen through',
  ].filter((one) => one !== null)
  return [
    `${whenText(step.begunAt, now, zone)} to ${whenText(step.endedAt, now, zone)}, ${hoursText(hoursOf(step))}`,
    ...(reached.length > 0 ? [reached.join(', ')] : []),
    ...(heldHours > 0 ? [`held for ${hoursText(heldHours)}: ${heldReason || 'no reason told'}`] : []),
    ...(note ? [note] : []),
  ]
}

export function beginLines(
  { at, isVoid }: Pick<BoardPress, 'at' | 'isVoid'>,
  { now, zone }: Clock,
): string[] {
  return [isVoid ? 'taken back' : `begun ${whenText(at, now, zone)}`]
}

/**
 * What a change means for readings taken after the half, in sentences: `then` before it is made, `now` after;
 * `isAhead` where those still to come carry a doubt as well.
 */
export function doubtsChanged(
  { doubted, freed }: { doubted: number; freed: number },
  when: 'then' | 'now',
  isAhead = false,
): string[] {
  const readings = (count: number) =>
    `${capital(counted(count, 'reading'))} taken after it ${count === 1 ? 'carries' : 'carry'}`
  return [
    ...(doubted > 0
      ? [`${readings(doubted)} a doubt ${when}, until someone answers it.`]
      : isAhead
        ? [`Readings taken after it carry a doubt ${when}, until someone answers it.`]
        : []),
    ...(freed > 0 ? [`${readings(freed)} no doubt because of it any longer.`] : []),
  ]
}
