import type { Trx } from '@/lib/db/client'
import { loadFrame } from '@/lib/series/queries/frame'
import { seriesUnits } from '@/lib/series/rules/input'
import { sentenceContext } from '@/lib/series/rules/spoken'
import type { ReadingRow } from '../queries/one'
import { valueDoubts, type EntryDoubt } from '../rules/entry-doubts'
import type { EntryValue } from '../rules/impossible-entry'

/** What speaks against the value that a correction gives, as at the first entry; an initial has nothing to be held against. */
export async function judgeInstead(trx: Trx, reading: ReadingRow, read: EntryValue): Promise<EntryDoubt[]> {
  if (reading.studyStationId === null) return []
  const frame = await loadFrame(trx, reading.studyId)
  const unit = seriesUnits(frame, new Set([reading.attribute]), []).find(
    (one) => one.batch.id === reading.batchId && one.station.id === reading.studyStationId,
  )
  const own = unit?.jars.find((jar) => jar.ids.includes(reading.id))
  if (!unit || !own) return []
  const torquePercent = read.detail['torquePercent']
  return valueDoubts(
    { ...unit.input, readings: unit.input.readings.filter((other) => other.day !== own.day) },
    {
      time: unit.input.readings.find((other) => other.id === own.id)!.time,
      values: own.rows.map((row) => (row.id === reading.id ? read.value : row.value!)),
      isRepeat: own.rows[0]!.repeatOf !== null,
      ...(typeof torquePercent === 'number' ? { torquePercent } : {}),
    },
    sentenceContext(frame.study, unit.station, unit.attribute),
  ).map(({ reason, sentence }) => ({ reason, sentence }))
}
