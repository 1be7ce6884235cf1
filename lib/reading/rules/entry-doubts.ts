import { doubtOnEntry } from '@/lib/science/entry'
import { ScienceError } from '@/lib/science/guard'
import type { RuleFinding, SeriesInput } from '@/lib/science/series'
import { sentenceOf, type SentenceContext } from '@/lib/science/sentence'
import { spokenDay } from '@/lib/study/rules/calendar'
import { changedConditions, type Conditions } from './conditions'

/** A doubt that halves of a cycle brought falls away with the last of them that is in force. */
export type EntryDoubt = { reason: string; sentence: string; cycleStepIds?: string[] }

export type UsedInstrument = { code: string; dueOn: string | null; result: string | null }

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
