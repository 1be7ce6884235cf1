import { attributeOf } from '@/lib/reading/schema/attributes'
import { ownRules, type Assessed } from '@/lib/series/rules/assess'
import type { EntryDoubt, Frame } from '@/lib/series/queries/frame'
import { commonShift, type ShiftedDay } from '@/lib/series/rules/shifted-day'
import { ruleSentence, sentenceContext } from '@/lib/series/rules/spoken'
import type { RuleFinding } from '@/lib/science/series'
import { inSentence } from '@/lib/study/rules/finding'
import { spokenDay } from '@/lib/study/rules/calendar'

export type FlagLevel = 'out' | 'leaning' | 'flag' | 'doubt'

/** What someone must answer, as the rules find it now. */
export type WantedFlag = {
  batchId: string
  studyStationId: string | null
  attribute: string
  rule: string
  level: FlagLevel
  readingId: string | null
  instrumentId: string | null
  onDay: string | null
  atWeeks: number
  sentence: string
  evidence: Record<string, unknown>
}

export function wantedFlags(
  frame: Frame,
  assessed: readonly Assessed[],
  shifted: readonly ShiftedDay[],
): WantedFlag[] {
  return [
    ...assessed.flatMap((one) => [...fromRules(frame, one), ...fromEntries(one)]),
    ...shifted.filter((day) => day.settles === null).flatMap((day) => fromShift(frame, assessed, day)),
  ]
}

/** Of several runs of one rule the latest is what wants an answer; each doubted reading is a matter of its own. */
function fromRules(frame: Frame, { unit, finding }: Assessed): WantedFlag[] {
  const latest = new Map<string, RuleFinding>()
  for (const rule of finding.rules) {
    if (rule.level === 'note') continue
    // A reference is watched, not judged: only what would spoil the comparison wants an answer.
    if (unit.batch.isReference && rule.level !== 'doubt') continue
    latest.set(rule.level === 'doubt' ? `${rule.rule} ${rule.readingId}` : `${rule.rule} ${rule.level}`, rule)
  }
  const context = sentenceContext(frame.study, unit.station, unit.attribute)
  return [...latest.values()].map((rule) => ({
    ...nowhere,
    batchId: unit.batch.id,
    studyStationId: unit.station.id,
    attribute: unit.attribute,
    rule: rule.rule,
    level: rule.level as FlagLevel,
    readingId: rule.readingId ?? null,
    atWeeks: rule.at,
    sentence: ruleSentence(rule, context, attributeOf(unit.attribute, frame.study.plan)),
    evidence: rule.evidence,
  }))
}

/** Doubts found when the reading was taken, until a usable repeat or a person settles them. */
function fromEntries({ unit }: Assessed): WantedFlag[] {
  return unit.jars.flatMap((jar, index) => {
    const reading = unit.input.readings[index]!
    const isRepeated = unit.input.readings.some(
      (other) =>
        other.isRepeatOf === jar.id && !other.isSetAside && other.doubts.every((doubt) => doubt.settled),
    )
    if (reading.isSetAside || isRepeated) return []
    const open = new Set(reading.doubts.filter((doubt) => !doubt.settled).map((doubt) => doubt.reason))
    return firstOfEach(jar.doubts)
      .filter((doubt) => open.has(doubt.reason) && !ownRules.has(doubt.reason))
      .map((doubt) => ({
        ...nowhere,
        batchId: unit.batch.id,
        studyStationId: unit.station.id,
        attribute: unit.attribute,
        rule: doubt.reason,
        level: 'doubt' as const,
        readingId: jar.id,
        atWeeks: reading.time,
        sentence: doubt.sentence,
        evidence: { value: reading.values.join(', '), jar: reading.jar },
      }))
  })
}

function fromShift(frame: Frame, assessed: readonly Assessed[], shift: ShiftedDay): WantedFlag[] {
  const unit = assessed.find((one) => one.unit.attribute === shift.attribute)?.unit
  if (!unit) return []
  return [
    {
      ...nowhere,
      batchId: unit.batch.id,
      attribute: shift.attribute,
      rule: commonShift,
      level: 'doubt',
      instrumentId: shift.instrumentId,
      onDay: shift.day,
      atWeeks: shift.atWeeks,
      sentence: `On ${spokenDay(shift.day)} one instrument read ${inSentence(shift.attribute)} ${shift.direction} at ${shift.evidence.beyondOne} of ${shift.evidence.residuals.length} places, the coldest too. That day's readings wait for repeats: check the instrument first.`,
      evidence: { ...shift.evidence },
    },
  ]
}

function firstOfEach(doubts: EntryDoubt[]): EntryDoubt[] {
  return doubts.filter((doubt, index) => doubts.findIndex((other) => other.reason === doubt.reason) === index)
}

const nowhere = { studyStationId: null, readingId: null, instrumentId: null, onDay: null }
