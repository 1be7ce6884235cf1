import { addDays, spokenDay } from '@/lib/study/rules/calendar'

export type LotAge = {
  name: string
  lot: string
  expiresOn: string
  openedOn: string | null
  keepsDays: number | null
}

/** The last day on which it is good: its expiry, or so many days after it was opened. */
export function goodUntil({ expiresOn, openedOn, keepsDays }: LotAge): string {
  if (!openedOn || keepsDays === null) return expiresOn
  const opened = addDays(openedOn, keepsDays)
  return opened < expiresOn ? opened : expiresOn
}

/** Why it should not be relied on that day; null where it is good. */
export function lotDoubt(lot: LotAge, day: string): string | null {
  const until = goodUntil(lot)
  if (day <= until) return null
  return until === lot.expiresOn
    ? `${lot.name}, lot ${lot.lot}, expired on ${spokenDay(until)}.`
    : `${lot.name}, lot ${lot.lot}, has been open since ${spokenDay(lot.openedOn!)} and keeps ${lot.keepsDays} days.`
}
