import type { EntryDoubt } from '@/lib/reading/rules/entry-doubts'

/** A freezer's half that stops this far short of its mark did not freeze what it should [practice]. */
const cycleToleranceC = 3
/** Loading and unloading take their part of an hour [practice]. */
export const hoursTolerance = 1

export type FreezeThawPlace = { cycleLowC: number | null; cycleHighC: number | null }
export type LoggedHalf = {
  id?: string
  cycle: number
  half: string
  reachedC: number | null
  /** Of the dummy jar, where the lab keeps one. */
  coreC?: number | null
  isFrozenThrough: boolean | null
  hours: number
}

/** What the protocol asks of a cycle; where it asks nothing, the station's own temperatures hold. */
export type AskedCycle = { coldHours: number; warmHours: number; isFrozenThrough: boolean }

export function askedHours(half: string, asked: AskedCycle | undefined): number | null {
  return (half === 'cold' ? asked?.coldHours : asked?.warmHours) ?? null
}

/** A cycle cut short is a doubt on every reading after it. */
export function cycleDoubts(
  place: FreezeThawPlace,
  halves: readonly LoggedHalf[],
  asked?: AskedCycle,
): EntryDoubt[] {
  const short = halves.filter((half) => shortfalls(place, half, asked).length > 0)
  if (short.length === 0) return []
  const cycles = [...new Set(short.map((half) => half.cycle))].toSorted((a, b) => a - b)
  return [
    {
      reason: 'cycle',
      // The doubt is gone once none of these is in force.
      ...(short.every(({ id }) => id) ? { cycleStepIds: short.map(({ id }) => id!) } : {}),
      sentence: `${cycles.length === 1 ? 'Cycle' : 'Cycles'} ${cycles.join(', ')} fell short of ${asked ? 'what the protocol asks' : "the station's temperatures"}. Say whether the jar counts as it is.`,
    },
  ]
}

/** In what a half fell short, each as a sentence; empty where it is a whole half. */
export function shortfalls(
  { cycleLowC, cycleHighC }: FreezeThawPlace,
  half: LoggedHalf,
  asked?: AskedCycle,
): string[] {
  const found: string[] = []
  const hours = askedHours(half.half, asked)
  if (hours !== null && half.hours < hours - hoursTolerance)
    found.push(`It lasted ${half.hours.toFixed(1)} of ${hours} h.`)
  const { reachedC, coreC = null } = half
  if (half.half === 'warm') {
    if (reachedC !== null && cycleHighC !== null && reachedC < cycleHighC - cycleToleranceC)
      found.push(`It reached ${celsius(reachedC)}, ${celsius(cycleHighC)} is asked for.`)
    return found
  }
  if ((asked?.isFrozenThrough ?? true) && half.isFrozenThrough === false)
    found.push('The jars were not frozen through.')
  if (cycleLowC === null) return found
  if (reachedC !== null && reachedC > cycleLowC + cycleToleranceC)
    found.push(`It reached ${celsius(reachedC)}, ${celsius(cycleLowC)} is asked for.`)
  if (coreC !== null && coreC > cycleLowC + cycleToleranceC)
    found.push(`The dummy jar's core reached ${celsius(coreC)}, ${celsius(cycleLowC)} is asked for.`)
  return found
}

export function celsius(value: number): string {
  return `${String(value).replace('-', '−')} °C`
}
