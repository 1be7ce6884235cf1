import { tzOffset } from '@date-fns/tz'

export type DateOrder = 'day first' | 'month first'
type Wall = { year: number; month: number; day: number; hour: number; minute: number; second: number }
export type WrittenTime =
  | { kind: 'wall'; wall: Wall; isEitherOrder: boolean }
  | { kind: 'instant'; at: number }
  | { kind: 'unreadable' }

const iso =
  /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})(?:[T ,]+(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,]\d+)?)?\s*(Z|[+-]\d{2}:?\d{2})?)?$/i
const local =
  /^(\d{1,2})([./-])(\d{1,2})[./-](\d{2}|\d{4})(?:[T ,]+(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,]\d+)?)?\s*([ap])?\.?m?\.?)?$/i

/**
 * A date and time as loggers write them: year first, day.month.year, or with slashes in either order, which `order`
 * settles. Two-digit years are of this century.
 */
export function readTime(text: string, order: DateOrder | null): WrittenTime {
  const isoMatch = iso.exec(text)
  if (isoMatch) {
    const [, year, month, day, hour, minute, second, zone] = isoMatch
    const wall = wallOf(Number(year), Number(month), Number(day), clockOf(hour, minute, second))
    if (!wall) return { kind: 'unreadable' }
    if (!zone) return { kind: 'wall', wall, isEitherOrder: false }
    return { kind: 'instant', at: utcOf(wall) - offsetOf(zone) }
  }
  const match = local.exec(text)
  if (!match) return { kind: 'unreadable' }
  const [, a, sign, b, yearText, hour, minute, second, half] = match
  const [first, next] = [Number(a), Number(b)]
  const isEitherOrder = sign !== '.' && first <= 12 && next <= 12 && first !== next
  const isMonthFirst = sign !== '.' && (order === 'month first' || (order === null && next > 12))
  const [day, month] = isMonthFirst ? [next, first] : [first, next]
  const year = Number(yearText) + (yearText!.length === 2 ? 2000 : 0)
  const wall = wallOf(year, month, day, clockOf(hour, minute, second, half))
  return wall ? { kind: 'wall', wall, isEitherOrder } : { kind: 'unreadable' }
}

/** Which order a written date proves: one of its two numbers is no month. */
export function provenOrder(text: string): DateOrder | null {
  const match = local.exec(text)
  if (!match || match[2] === '.') return null
  if (Number(match[1]) > 12) return 'day first'
  return Number(match[3]) > 12 ? 'month first' : null
}

export function isTime(text: string): boolean {
  return readTime(text, null).kind !== 'unreadable' || readTime(text, 'month first').kind !== 'unreadable'
}

/** The instants at which a clock of this zone shows this: none in the hour that is skipped, two in the one that comes twice. */
export function instantsOf(wall: Wall, zone: string, offsets: Offsets): number[] {
  const utc = utcOf(wall)
  const day = 86_400_000
  const found = new Set<number>()
  for (const near of [utc - day, utc + day]) {
    const at = utc - offsets.at(zone, near)
    if (offsets.at(zone, at) === utc - at) found.add(at)
  }
  return [...found].toSorted((a, b) => a - b)
}

/** A zone's offset changes on a quarter of an hour at the most, so that it is asked once for each. */
export class Offsets {
  readonly #known = new Map<number, number>()

  at(zone: string, instant: number): number {
    const quarter = Math.floor(instant / 900_000)
    const known = this.#known.get(quarter)
    if (known !== undefined) return known
    const offset = tzOffset(zone, new Date(quarter * 900_000)) * 60_000
    this.#known.set(quarter, offset)
    return offset
  }
}

function clockOf(hour?: string, minute?: string, second?: string, half?: string) {
  let hours = Number(hour ?? 0)
  if (half && hours >= 1 && hours <= 12) hours = (hours % 12) + (half.toLowerCase() === 'p' ? 12 : 0)
  return { hour: hours, minute: Number(minute ?? 0), second: Number(second ?? 0) }
}

function wallOf(year: number, month: number, day: number, clock: Omit<Wall, 'year' | 'month' | 'day'>) {
  const wall = { year, month, day, ...clock }
  const back = new Date(utcOf(wall))
  const isReal =
    back.getUTCFullYear() === year &&
    back.getUTCMonth() === month - 1 &&
    back.getUTCDate() === day &&
    clock.hour < 24 &&
    clock.minute < 60 &&
    clock.second < 60
  return isReal ? wall : null
}

function utcOf({ year, month, day, hour, minute, second }: Wall): number {
  return Date.UTC(year, month - 1, day, hour, minute, second)
}

function offsetOf(zone: string): number {
  if (zone.toUpperCase() === 'Z') return 0
  const minutes = Number(zone.slice(1, 3)) * 60 + Number(zone.slice(-2))
  return (zone.startsWith('-') ? -minutes : minutes) * 60_000
}
