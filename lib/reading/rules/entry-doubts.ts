import { doubtOnEntry } from '@/lib/science/entry'
import { ScienceError } from '@/lib/science/guard'
import type { RuleFinding, SeriesInput } from '@/lib/science/series'
import { sentenceOf, type SentenceContext } from '@/lib/science/sentence'
import { spokenDay } from '@/lib/study/rules/calendar'
import { changedConditions, type Conditions } from './conditions'

export type EntryDoubt = { reason: string; sentence: string }

export type UsedInstrument = { code: string; dueOn: string | null; result: string | null }

/** A freezer's half that stops this far short of its mark did not freeze what it should [practice]. */
const cycleToleranceC = 3

/** What is asked about before it is taken: it may be so, but it is more likely a slip. */
const asked = new Set(['jump', 'spread', 'torque'])

export type SeenEntry = { time: number; values: number[]; torquePercent?: number; isRepeat: boolean }

/** What speaks against the value itself, as sentences; `isAsked` where the person has to say that it is so. */
export function valueDoubts(
  input: SeriesInput,
  entry: SeenEntry,
  context: SentenceContext,
): (EntryDoubt & { isAsked: boolean })[] {
  return findings(input, entry)
    .filter((finding) => asked.has(finding.rule))
    .map((finding) => ({ reason: finding.rule, sentence: sentenceOf(finding, context), isAsked: true }))
}

function findings(input: SeriesInput, entry: SeenEntry): RuleFinding[] {
  try {
    return doubtOnEntry(input, entry)
  } catch (error) {
    if (error instanceof ScienceError) return []
    throw error
  }
}

/** Readings compare only with an instrument that can be trusted and under the initial's conditions. */
export function conditionDoubts(
  used: Conditions & { instrument: UsedInstrument | null },
  initial: Conditions,
  measuredOn: string,
): EntryDoubt[] {
  const calibration = instrumentDoubt(used.instrument, measuredOn)
  const changed = changedConditions(used, initial)
  return [
    ...(calibration ? [{ reason: 'calibration', sentence: calibration }] : []),
    ...(changed ? [{ reason: 'conditions', sentence: changed }] : []),
  ]
}

function instrumentDoubt(instrument: UsedInstrument | null, measuredOn: string): string | null {
  if (!instrument) return null
  const { code, dueOn, result } = instrument
  if (result === 'doubtful')
    return `The last calibration of ${code} was doubtful. Calibrate it and measure again.`
  if (dueOn === null) return `${code} has no calibration on record. Calibrate it and measure again.`
  if (dueOn < measuredOn)
    return `The calibration of ${code} was due on ${spokenDay(dueOn)}. Calibrate it and measure again.`
  return null
}

export type FreezeThawPlace = { cycleLowC: number | null; cycleHighC: number | null }
export type LoggedHalf = {
  cycle: number
  half: string
  reachedC: number | null
  isFrozenThrough: boolean | null
  hours: number
}

/** What the protocol asks of a cycle; where it asks nothing, the station's own temperatures hold. */
export type AskedCycle = { coldHours: number; warmHours: number; isFrozenThrough: boolean }

/** A cycle cut short is a doubt on every reading after it. */
export function cycleDoubts(
  place: FreezeThawPlace,
  halves: readonly LoggedHalf[],
  asked?: AskedCycle,
): EntryDoubt[] {
  const short = halves.filter((half) => isShort(place, half, asked))
  if (short.length === 0) return []
  const cycles = [...new Set(short.map((half) => half.cycle))].toSorted((a, b) => a - b)
  return [
    {
      reason: 'cycle',
      sentence: `${cycles.length === 1 ? 'Cycle' : 'Cycles'} ${cycles.join(', ')} fell short of ${asked ? 'what the protocol asks' : "the station's temperatures"}. Say whether the jar counts as it is.`,
    },
  ]
}

/** Loading and unloading take their part of an hour. */
const hoursTolerance = 1

function isShort({ cycleLowC, cycleHighC }: FreezeThawPlace, half: LoggedHalf, asked?: AskedCycle): boolean {
  const hours = half.half === 'cold' ? asked?.coldHours : asked?.warmHours
  if (hours !== undefined && half.hours < hours - hoursTolerance) return true
  if (half.half === 'cold') {
    return (
      ((asked?.isFrozenThrough ?? true) && half.isFrozenThrough === false) ||
      (half.reachedC !== null && cycleLowC !== null && half.reachedC > cycleLowC + cycleToleranceC)
    )
  }
  return half.reachedC !== null && cycleHighC !== null && half.reachedC < cycleHighC - cycleToleranceC
}
