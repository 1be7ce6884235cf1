import { addDays, dayIn, spokenDay } from './calendar'

/** What the lab has said of its days. Monday is 1, Sunday 7. */
export type LabCalendar = {
  timeZone: string
  workingDays: number[]
  holidays: { day: string; name: string }[]
}

export const weekdays = [
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
  'Sunday',
] as const

type InWindow = { nominalOn: string; windowFrom: string; windowTo: string }
export type LaidOut<T extends InWindow> = T & {
  /** The day on which the pull is planned. */
  dueOn: string
  /** Why it is not planned on its nominal day, or why nobody is there on the day it keeps. */
  because: string | null
  /** No day of its window was free, so it keeps the nominal one. */
  isStuck: boolean
}

/**
 * Lays the pulls of one station on working days. Each stays on its nominal day where the lab works then; else it
 * moves to the nearest working day inside its window, of two equally near ones to the later: a jar that is read a
 * day late has stood as long as the time point says, one that is read early has not (common practice, no source).
 * Two pulls never share a day. A pull whose window holds no day that would do keeps its own, and says so.
 */
export function layOut<T extends InWindow>(
  pulls: T[],
  calendar: LabCalendar,
  { notBefore, taken = [] }: { notBefore?: string; taken?: string[] } = {},
): LaidOut<T>[] {
  const holidays = new Map(calendar.holidays.map(({ day, name }) => [day, name]))
  const why = (day: string) => whyClosed(calendar, day, holidays)
  // Who may stay where it is comes first: a pull that is moved takes no day from one that is not.
  const used = new Set(taken)
  const stays = pulls.map(({ nominalOn }) => {
    const isFree =
      (notBefore === undefined || nominalOn >= notBefore) && !used.has(nominalOn) && why(nominalOn) === null
    if (isFree) used.add(nominalOn)
    return isFree
  })
  return pulls.map((pull, at) => {
    if (stays[at]) return { ...pull, dueOn: pull.nominalOn, because: null, isStuck: false }
    const because = why(pull.nominalOn) ?? 'another pull of the station has this day'
    const day = nearest(pull).find(
      (one) => (notBefore === undefined || one >= notBefore) && !used.has(one) && why(one) === null,
    )
    if (day === undefined) return { ...pull, dueOn: pull.nominalOn, because, isStuck: true }
    used.add(day)
    return { ...pull, dueOn: day, because, isStuck: false }
  })
}

/** Why the lab does not work on a day: the holiday's name, the weekday, or that its zone left the day out; else null. */
export function whyClosed(
  calendar: LabCalendar,
  day: string,
  holidays = new Map(calendar.holidays.map((one) => [one.day, one.name])),
): string | null {
  const holiday = holidays.get(day)
  if (holiday !== undefined) return holiday
  const weekday = weekdayOf(day)
  if (!calendar.workingDays.includes(weekday)) return weekdays[weekday - 1]!
  return isLeftOut(calendar.timeZone, day) ? 'a day that the lab’s time zone left out' : null
}

/** 1 for Monday to 7 for Sunday [std: ISO 8601]. */
export function weekdayOf(day: string): number {
  return new Date(`${day}T00:00:00Z`).getUTCDay() || 7
}

export function mondayOf(day: string): string {
  return addDays(day, 1 - weekdayOf(day))
}

/** "Thu 24 Dec 2026". */
export function namedDay(day: string, withYear = true): string {
  return `${weekdays[weekdayOf(day) - 1]!.slice(0, 3)} ${spokenDay(day, withYear)}`
}

/** "Stocktaking (Wed 23 Dec), Winter closing (Thu 24 Dec to Fri 1 Jan)": days of one name, a week's end between them or not, as one. */
export function holidaysText(holidays: { day: string; name: string }[]): string {
  const spans: { name: string; from: string; to: string }[] = []
  for (const { day, name } of holidays) {
    const last = spans.at(-1)
    if (last?.name === name && day <= addDays(last.to, 3)) last.to = day
    else spans.push({ name, from: day, to: day })
  }
  return spans
    .map(({ name, from, to }) =>
      from === to
        ? `${name} (${namedDay(from, false)})`
        : `${name} (${namedDay(from, false)} to ${namedDay(to, false)})`,
    )
    .join(', ')
}

/** The window's days by their distance from the nominal one, the later of two first. */
function nearest({ nominalOn, windowFrom, windowTo }: InWindow): string[] {
  const days: string[] = []
  for (let away = 1; ; away++) {
    const [later, earlier] = [addDays(nominalOn, away), addDays(nominalOn, -away)]
    if (later > windowTo && earlier < windowFrom) return days
    if (later <= windowTo) days.push(later)
    if (earlier >= windowFrom) days.push(earlier)
  }
}

const hourMs = 3_600_000
const known = new Map<string, boolean>()

/**
 * A zone that moves across the date line skips a day: Samoa had no 30 December 2011 [IANA tz, australasia]. Offsets
 * lie between −12 and +14 hours, so an hour of every day that there is falls between these two instants.
 */
function isLeftOut(timeZone: string, day: string): boolean {
  const key = `${timeZone} ${day}`
  const before = known.get(key)
  if (before !== undefined) return before
  const noon = Date.parse(`${day}T12:00:00Z`)
  // Noon of the day in UTC lies in it for most zones; only elsewhere every hour is tried.
  const hours = [0, ...Array.from({ length: 51 }, (_, at) => at - 26)]
  const isThere = hours.some((hour) => dayIn(timeZone, new Date(noon + hour * hourMs).toISOString()) === day)
  if (known.size > 10_000) known.clear()
  known.set(key, !isThere)
  return !isThere
}
