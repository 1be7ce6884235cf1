import { doubtOnEntry } from '@/lib/science/entry'
import { ScienceError } from '@/lib/science/guard'
import type { RuleFinding, SeriesInput } from '@/lib/science/series'
import { sentenceOf, type SentenceContext } from '@/lib/science/sentence'
import { spokenDay } from '@/lib/study/rules/calendar'

export type EntryDoubt = { reason: string; sentence: string }

export type UsedConditions = {
  instrument: { code: string; dueOn: string | null; result: string | null } | null
  spindle: string | null
  rpm: number | null
  sampleTemperatureC: number | null
}
export type InitialConditions = {
  spindle: string | null
  rpm: number | null
  sampleTemperatureC: number | null
}

/** Further off than this from the initial's sample, a viscosity or a pH is another number [practice]. */
const temperatureToleranceC = 1
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

/** Readings compare only under the initial's conditions and with an instrument that can be trusted. */
export function conditionDoubts(
  used: UsedConditions,
  initial: InitialConditions,
  measuredOn: string,
): EntryDoubt[] {
  const doubts: EntryDoubt[] = []
  const { instrument } = used
  if (instrument?.result === 'doubtful') {
    doubts.push({
      reason: 'calibration',
      sentence: `The last calibration of ${instrument.code} was doubtful. Calibrate it and measure again.`,
    })
  } else if (instrument && instrument.dueOn === null) {
    doubts.push({
      reason: 'calibration',
      sentence: `${instrument.code} has no calibration on record. Calibrate it and measure again.`,
    })
  } else if (instrument?.dueOn && instrument.dueOn < measuredOn) {
    doubts.push({
      reason: 'calibration',
      sentence: `The calibration of ${instrument.code} was due on ${spokenDay(instrument.dueOn)}. Calibrate it and measure again.`,
    })
  }
  const changed = changedConditions(used, initial)
  if (changed.length > 0) {
    doubts.push({
      reason: 'conditions',
      sentence: `Measured with ${changed.join(' and ')}; such readings do not compare. Measure again as at the start.`,
    })
  }
  return doubts
}

function changedConditions(used: UsedConditions, initial: InitialConditions): string[] {
  const changed: string[] = []
  if (used.spindle && initial.spindle && used.spindle !== initial.spindle) {
    changed.push(`spindle ${used.spindle} instead of the initial's ${initial.spindle}`)
  }
  if (used.rpm !== null && initial.rpm !== null && used.rpm !== initial.rpm) {
    changed.push(`${used.rpm} rpm instead of ${initial.rpm}`)
  }
  if (
    used.sampleTemperatureC !== null &&
    initial.sampleTemperatureC !== null &&
    Math.abs(used.sampleTemperatureC - initial.sampleTemperatureC) > temperatureToleranceC
  ) {
    changed.push(`the sample at ${used.sampleTemperatureC} °C instead of ${initial.sampleTemperatureC} °C`)
  }
  return changed
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
