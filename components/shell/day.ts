import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

/** "Tuesday, 1 Dec 2026", as the lab's own clock has it. */
export function dayWithName(now: string, timeZone: string): string {
  const instant = new Date(now)
  const name = new Intl.DateTimeFormat('en', { timeZone, weekday: 'long' }).format(instant)
  return `${name}, ${spokenDay(dayIn(timeZone, now))}`
}

/** "1 Dec 2026, 14:05", as the lab's own clock has it. */
export function momentInWords(instant: string, timeZone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'short' }).format(new Date(instant))
  return `${spokenDay(dayIn(timeZone, instant))}, ${time}`
}
