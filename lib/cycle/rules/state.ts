import { askedHours, hoursTolerance, type AskedCycle } from './shortfall'

export type Half = 'cold' | 'warm'
export type CyclePress = {
  cycle: number
  half: string
  press: string
  at: string
  reason: string
  by: string
}
export type WholeHalf = { cycle: number; half: string; begunAt: string; endedAt: string; by: string }

/** What is known of a freeze-thaw station of a study: all that its state follows from. */
export type CycleRecord = {
  cycles: number
  asked: AskedCycle | undefined
  steps: readonly WholeHalf[]
  presses: readonly CyclePress[]
}

export type Running = {
  kind: 'running'
  cycle: number
  half: Half
  begunAt: string
  begunBy: string
  askedHours: number | null
  /** When its hours are over; a hold that covers that moment puts it off to its own end. Null while held, or unasked. */
  dueAt: string | null
  hold: { since: string; reason: string; by: string } | null
  hours: number
  heldHours: number
  /** Until it is due; null where nothing is asked or it is held past that. */
  leftHours: number | null
  isDue: boolean
  isOverdue: boolean
}
export type CycleState =
  | Running
  | { kind: 'waiting'; cycle: number; half: Half; since: string | null }
  | { kind: 'over'; since: string | null }

const hour = 3_600_000

/** Where a freeze-thaw station stands at an instant: what runs, or which half comes next. */
export function cycleState(record: CycleRecord, now: string): CycleState {
  const begun = record.presses.find((press) => press.press === 'begin' && !isEnded(record, press))
  if (begun) return running(record, begun, Date.parse(now))
  const last = record.steps.toSorted((a, b) => orderOf(a) - orderOf(b)).at(-1)
  const next: { cycle: number; half: Half } =
    !last || last.half === 'warm'
      ? { cycle: (last?.cycle ?? 0) + 1, half: 'cold' }
      : { cycle: last.cycle, half: 'warm' }
  const since = last?.endedAt ?? null
  return next.cycle > record.cycles ? { kind: 'over', since } : { kind: 'waiting', ...next, since }
}

function running({ asked, presses }: CycleRecord, begun: CyclePress, now: number): Running {
  const from = Date.parse(begun.at)
  // An end that is told late lies before what was pressed since.
  const holds = holdsOf(presses.filter((press) => isSame(press, begun) && Date.parse(press.at) <= now))
  const open = holds.find((hold) => hold.to === null) ?? null
  const prescribed = askedHours(begun.half, asked)
  const dueAt = prescribed === null ? null : putOff(from + prescribed * hour, holds, now)
  const isLate = dueAt !== null && (open === null || dueAt < open.from)
  return {
    kind: 'running',
    cycle: begun.cycle,
    half: begun.half as Half,
    begunAt: begun.at,
    begunBy: begun.by,
    askedHours: prescribed,
    dueAt: dueAt === null ? null : new Date(dueAt).toISOString(),
    hold: open && { since: new Date(open.from).toISOString(), reason: open.reason, by: open.by },
    hours: (now - from) / hour,
    heldHours: holds.reduce((sum, hold) => sum + ((hold.to ?? now) - hold.from) / hour, 0),
    leftHours: dueAt === null ? null : Math.max(0, (dueAt - now) / hour),
    isDue: dueAt !== null && open === null && now >= dueAt,
    isOverdue: isLate && open === null && now > dueAt + hoursTolerance * hour,
  }
}

type Hold = { from: number; to: number | null; reason: string; by: string }

function holdsOf(presses: readonly CyclePress[]): Hold[] {
  const holds: Hold[] = []
  for (const press of presses.toSorted((a, b) => Date.parse(a.at) - Date.parse(b.at))) {
    const at = Date.parse(press.at)
    if (press.press === 'hold') holds.push({ from: at, to: null, reason: press.reason, by: press.by })
    const last = holds.at(-1)
    if (press.press === 'go on' && last) last.to = at
  }
  return holds
}

/** A half that comes due while it is held waits for the end of the hold. */
function putOff(due: number, holds: readonly Hold[], now: number): number | null {
  let at = due
  for (const hold of holds) {
    if (at < hold.from || (hold.to !== null && at >= hold.to)) continue
    if (hold.to === null) return now >= at ? null : at
    at = hold.to
  }
  return at
}

export function orderOf({ cycle, half }: { cycle: number; half: string }): number {
  return 2 * cycle + (half === 'warm' ? 1 : 0)
}

function isEnded(record: CycleRecord, press: CyclePress): boolean {
  return record.steps.some((step) => isSame(step, press))
}

function isSame(a: { cycle: number; half: string }, b: { cycle: number; half: string }): boolean {
  return a.cycle === b.cycle && a.half === b.half
}
