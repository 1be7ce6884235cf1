import { namedJar } from '@/lib/jar/rules/code'
import { choice, day, describeList } from '@/lib/list/schema'
import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import { howRead } from '@/lib/reading/rules/how-read'
import type { ReadingEntry } from '../queries/readings'

/** A line is one entry: a correction and what it superseded are lines of their own, so that a file hides nothing either. */
export const readingList = describeList<ReadingEntry>()({
  name: 'readings',
  sort: 'recorded',
  columns: [
    { key: 'jar', title: 'jar', sort: 'text', value: jarName },
    { key: 'time', title: 'time', sort: 'number', value: (entry) => entry.label ?? 'initial' },
    { key: 'attribute', title: 'attribute', sort: 'text', value: (entry) => attributeName(entry.attribute) },
    {
      key: 'value',
      title: 'value',
      kind: 'number',
      sort: 'number',
      value: (entry) => (entry.isVoid ? 'void' : (entry.value ?? entry.word)),
    },
    { key: 'typed', title: 'as typed', value: (entry) => entry.typed },
    { key: 'how', title: 'read from', value: howRead },
    { key: 'by', title: 'read by', sort: 'text', value: (entry) => entry.readByName },
    {
      key: 'measured',
      title: 'measured',
      kind: 'instant',
      sort: 'instant',
      value: (entry) => entry.measuredAt,
    },
    { key: 'counts', title: 'counts', value: countsOf },
    { key: 'reason', title: 'why changed', isExtra: true, value: (entry) => entry.reason },
    {
      key: 'unit',
      title: 'unit',
      isExtra: true,
      value: (entry) => attributeOf(entry.attribute, entry).unit,
    },
    {
      key: 'replicate',
      title: 'replicate',
      kind: 'number',
      isExtra: true,
      value: (entry) => entry.replicate,
    },
    { key: 'batch', title: 'batch', sort: 'text', isExtra: true, value: (entry) => entry.batchCode },
    { key: 'station', title: 'station', sort: 'text', isExtra: true, value: (entry) => entry.stationName },
    {
      key: 'instrument',
      title: 'instrument',
      sort: 'text',
      isExtra: true,
      value: (entry) => entry.instrumentCode,
    },
    {
      key: 'doubts',
      title: 'doubts',
      isExtra: true,
      value: (entry) => entry.doubts.map((doubt) => doubt.sentence).join(' '),
    },
    {
      key: 'recorded',
      title: 'recorded',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (entry) => entry.recordedAt,
    },
  ],
  filters: {
    attribute: choice('Attribute'),
    station: choice('Station'),
    batch: choice('Batch'),
    by: choice('By'),
    changed: choice('Changed', ['corrected or voided']),
    from: day('Measured from'),
    to: day('to'),
  },
})

export function jarName(entry: ReadingEntry): string {
  if (!entry.jarCode) return entry.batchCode
  const { temperatureC, isFreezeThaw } = entry
  return namedJar(entry.jarCode, isFreezeThaw === null ? null : { temperatureC, isFreezeThaw })
}

function countsOf(entry: ReadingEntry): string {
  if (entry.isSuperseded) return 'superseded'
  return entry.isVoid ? 'void' : 'now'
}
