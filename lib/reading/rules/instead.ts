import { AppError } from '@/lib/http/errors'
import { laterCheck } from '@/lib/instrument/rules/trust'
import { torqueDoubt } from '@/lib/science/viscosity'
import type { ReadingRow } from '../queries/one'
import { conditionKeys } from './conditions'
import type { EntryDoubt } from './entry-doubts'
import { usedDoubts } from './used-doubts'

// How a corrected reading was come by: one corrects what was read, and how only where one says so.

const rotor = ['rpm', 'radiusMm', 'minutes']
const besides: Record<string, readonly string[]> = {
  centrifuge: rotor,
  type: ['typeMethod'],
  colour: ['isEstimate'],
}

/** Conditions of the entry that is corrected, for the value to be made under. */
export function keptConditions({ attribute, detail }: ReadingRow): Record<string, unknown> {
  return picked(detail, [...conditionKeys(attribute), ...(besides[attribute] ?? [])])
}

/** What else was noted of its circumstances. */
export function keptNotes({ detail }: ReadingRow): Record<string, unknown> {
  return picked(detail, ['method', 'clock', 'isFromPaper', 'window', 'restedHours'])
}

function picked(detail: Record<string, unknown>, keys: readonly string[]): Record<string, unknown> {
  return Object.fromEntries(keys.filter((key) => key in detail).map((key) => [key, detail[key]]))
}

/** What merely looks unlikely is asked about once, as at the first entry. */
export function askInstead(reading: ReadingRow, [first]: readonly EntryDoubt[]): void {
  if (!first) return
  const { sentence } = first
  throw new AppError(409, 'confirm', `${sentence} Is it so?`, {
    fields: { typed: sentence },
    detail: {
      questions: [{ field: 'typed', attribute: reading.attribute, readingId: reading.id, sentence }],
    },
  })
}

/** Rules of the drift find these again by themselves. */
const found = ['jump', 'spread']
const ofHow = ['conditions', 'calibration', laterCheck]

/**
 * What speaks against the value and how it was come by is told anew; where the jar stood and what it went through stays
 * as it was. An initial is what others are held against.
 */
export function doubtsInstead(
  reading: ReadingRow,
  detail: Record<string, unknown>,
  ofValue: readonly EntryDoubt[],
): EntryDoubt[] {
  const isStart = reading.studyStationId === null
  const anew = new Set([...found, 'torque', ...(isStart ? [] : ofHow)])
  const kept = reading.doubts.filter(({ reason }) => !anew.has(reason))
  if (isStart) return [...kept, ...torqueAlone(detail)]
  const planned = reading.plan.attributes.find((one) => one.attribute === reading.attribute)
  return [
    ...ofValue.filter(({ reason }) => reason === 'torque'),
    ...usedDoubts({
      ...{ instrument: reading.instruments[0] ?? null, detail, initial: reading.initialDetail },
      ...{ planned: planned ?? {}, measuredAt: reading.measuredAt, zone: reading.zone },
    }),
    ...kept,
  ]
}

function torqueAlone(detail: Record<string, unknown>): EntryDoubt[] {
  const torque = typeof detail['torquePercent'] === 'number' ? torqueDoubt(detail['torquePercent']) : null
  return torque ? [{ reason: 'torque', sentence: `${torque}. Check spindle and speed.` }] : []
}
