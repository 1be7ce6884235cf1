import { weeksSince } from '@/lib/science/months'

/** The day that a time point means: counted in days of the calendar, so no clock change moves it. */
export function nominalDay(startedOn: string, timeWeeks: number): string {
  return addDays(startedOn, Math.round(timeWeeks * 7))
}

export function addDays(day: string, days: number): string {
  const date = new Date(`${day}T00:00:00Z`)
  date.setUTCDate(date.getUTCDate() + days)
  return date.toISOString().slice(0, 10)
}

export function weeksBetween(from: string, to: string): number {
  return weeksSince(from.slice(0, 10), to.slice(0, 10))
}

/** The day an instant falls on in the lab. */
export function dayIn(timeZone: string, instant: string): string {
  return new Intl.DateTimeFormat('en-CA', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).format(new Date(instant))
}

/** "2 Mar 2026"; without the year where it goes without saying. */
export function spokenDay(day: string, withYear = true): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone: 'UTC',
    day: 'numeric',
    month: 'short',
    ...(withYear ? { year: 'numeric' } : {}),
  })
    .format(new Date(`${day.slice(0, 10)}T00:00:00Z`))
    .replace('Sept', 'Sep')
}
