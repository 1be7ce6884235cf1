import type { UsedInstrument } from '@/lib/instrument/queries/used'
import { calibrationAt, checkDoubts } from '@/lib/instrument/rules/trust'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { dayIn } from '@/lib/study/rules/calendar'
import { askedConditions, conditionsIn } from './conditions'
import { conditionDoubts, type EntryDoubt } from './entry-doubts'

type Used = {
  instrument: UsedInstrument | null
  detail: Record<string, unknown>
  /** How the batch's own initial was come by. */
  initial: Record<string, unknown> | null
  planned: Pick<PlannedAttribute, 'viscosity' | 'conditions'>
  measuredAt: string
  zone: string
}

/** What speaks against how a reading was come by: its instrument as it was known then, and its conditions. */
export function usedDoubts({ instrument, detail, initial, planned, measuredAt, zone }: Used): EntryDoubt[] {
  const known = instrument && { code: instrument.code, ...calibrationAt(instrument, measuredAt) }
  return [
    ...conditionDoubts(
      { instrument: known, ...conditionsIn(detail) },
      askedConditions(initial, planned),
      dayIn(zone, measuredAt),
    ),
    ...(instrument ? checkDoubts(instrument, measuredAt, (at) => dayIn(zone, at)) : []),
  ]
}
