import { addDays } from '@/lib/study/rules/calendar'
import { mostHolidays } from './schema'

export type ReadHolidays = { holidays: { day: string; name: string }[]; faults: string[] }

const months = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec']
const oneDay = String.raw`\d{4}-\d{1,2}-\d{1,2}|\d{1,2}\.\s?\d{1,2}\.\s?\d{4}|\d{1,2}/\d{1,2}/\d{4}|\d{1,2}\.?\s+[A-Za-z]{3,9}\.?\s+\d{4}`
const days = String.raw`(${oneDay})(?:\s*(?:to|until|–|—|\.\.+|-)\s*(${oneDay}))?`
const before = new RegExp(String.raw`^${days}[\s,;:]+(.*)$`)
const behind = new RegExp(String.raw`^(.*?)[\s,;:]+${days}$`)

/**
 * Days typed or pasted, a line each: "24 Dec 2026 Christmas Eve", "24.12.2026; closed", a name before its day, or
 * "2026-12-24 to 2027-01-01 winter break". What cannot be read is said with its line; the rest is read all the same.
 */
export function readHolidays(text: string): ReadHolidays {
  const holidays = new Map<string, string>()
  const faults: string[] = []
  text.split(/\r?\n/).forEach((raw, at) => {
    const line = raw.trim()
    if (line === '') return
    const read = readLine(line)
    if (typeof read === 'string') {
      if (faults.length < 20) faults.push(`Line ${at + 1}: ${read}`)
      return
    }
    read.days.forEach((day) => holidays.set(day, holidays.get(day) ?? read.name))
  })
  if (holidays.size > mostHolidays) {
    faults.push(`These are ${holidays.size} days. Add at most ${mostHolidays} at once.`)
  }
  return {
    holidays: [...holidays]
      .map(([day, name]) => ({ day, name }))
      .toSorted((a, b) => a.day.localeCompare(b.day)),
    faults,
  }
}

function readLine(line: string): { days: string[]; name: string } | string {
  const first = before.exec(line)
  const last = first ? null : behind.exec(line)
  if (!first && !last) {
    return new RegExp(`^${days}$`).test(line)
      ? 'name the holiday behind its day.'
      : `no day in "${line.slice(0, 40)}". Write it as 2026-12-24 or 24 Dec 2026, then the name.`
  }
  const [from, to, name] = first ? [first[1]!, first[2], first[3]!] : [last![2]!, last![3], last![1]!]
  const begin = readDay(from)
  const end = to === undefined ? begin : readDay(to)
  if (begin === 'two ways' || end === 'two ways') {
    return `${begin === 'two ways' ? from : to} can be read two ways. Write it as 2026-12-24 or 24 Dec 2026.`
  }
  if (begin === null || end === null) return `there is no day ${begin === null ? from : to}.`
  if (end < begin) return `${to} lies before ${from}. Turn them round.`
  const list = [begin]
  while (list.at(-1)! < end && list.length <= mostHolidays) list.push(addDays(list.at(-1)!, 1))
  return { days: list, name: name.trim().replaceAll(/\s+/g, ' ').slice(0, 80) }
}

/** A day as ISO text; null where the calendar has none. Slashes are read only where one order is possible. */
function readDay(text: string): string | 'two ways' | null {
  const slashed = /^(\d{1,2})\/(\d{1,2})\/(\d{4})$/.exec(text)
  if (slashed) {
    const [a, b, year] = slashed.slice(1).map(Number) as [number, number, number]
    if (a <= 12 && b <= 12 && a !== b) return 'two ways'
    return a > 12 ? isoDay(year, b, a) : isoDay(year, a, b)
  }
  const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(text)
  if (iso) return isoDay(Number(iso[1]), Number(iso[2]), Number(iso[3]))
  const parts = /^(\d{1,2})\.?\s*([A-Za-z]+|\d{1,2})\.?\s*(\d{4})$/.exec(text)
  if (!parts) return null
  const named = months.indexOf(parts[2]!.slice(0, 3).toLowerCase())
  return isoDay(Number(parts[3]), named === -1 ? Number(parts[2]) : named + 1, Number(parts[1]))
}

function isoDay(year: number, month: number, date: number): string | null {
  const at = new Date(Date.UTC(year, month - 1, date))
  const isThere = at.getUTCFullYear() === year && at.getUTCMonth() === month - 1 && at.getUTCDate() === date
  return isThere && year >= 2000 && year <= 2100 ? at.toISOString().slice(0, 10) : null
}
