import { attributeOf, type AttributeKey, type Attribute } from '@/lib/reading/schema/attributes'
import { isBeyondBand } from '@/lib/science/band'
import { mean } from '@/lib/science/mean'
import { weeksSince } from '@/lib/science/months'
import { percentOf } from '@/lib/science/percent'
import { trendAt } from '@/lib/science/trend'
import type { Band } from '@/lib/science/series'
import type { ReadingWithTrend } from '../queries/one'

export type AgainstTrend = {
  readingIds: string[]
  attribute: AttributeKey
  label: string
  unit: string
  decimals: Attribute['decimals']
  words: Attribute['words']
  value: number
  /** Where its own trend was that day; the latest counted value before it where there is no trend. */
  expected: number | null
  difference: number | null
  /** The same in percent of the initial, for one axis over several series. */
  differencePercent: number | null
  /** Scatter of the series about its trend, in percent of the initial. */
  scatterPercent: number | null
  initial: number | null
  band: Band | null
  isBeyond: boolean
  standing: string | null
  studyCode: string
  batchCode: string
  stationName: string
  temperatureC: number | null
  isFreezeThaw: boolean
  jarCode: string | null
  measuredAt: string
  /** The series that the flag is about. */
  isFlagged: boolean
}

/** Each series' reading against where that series leads, replicates of a jar as one mean. */
export function againstTrend(
  rows: readonly ReadingWithTrend[],
  flag: { studyCode: string; batchId: string; studyStationId: string | null; attribute: string },
): AgainstTrend[] {
  const groups = new Map<string, ReadingWithTrend[]>()
  for (const row of rows) {
    const key = [row.attribute, row.jarCode, row.studyStationId, row.batchId].join(' ')
    groups.set(key, [...(groups.get(key) ?? []), row])
  }
  return [...groups.values()].flatMap((group) => {
    const values = group.flatMap((row) => (row.value === null ? [] : [row.value]))
    const [row] = group
    if (!row || values.length === 0) return []
    return [compare(row, group, mean(values), flag)]
  })
}

function compare(
  row: ReadingWithTrend,
  group: ReadingWithTrend[],
  value: number,
  flag: { studyCode: string; batchId: string; studyStationId: string | null; attribute: string },
): AgainstTrend {
  const attribute = attributeOf(row.attribute, row)
  const { finding } = row
  const weeks = weeksSince(row.startedAt, row.measuredAt)
  const before = finding?.points.findLast((point) => point.counted && point.time < weeks - 0.1)
  const expected = finding?.trend ? trendAt(finding.trend, weeks) : (before?.mean ?? null)
  const initial = finding?.initial ?? null
  const difference = expected === null ? null : value - expected
  const inPercent = (size: number | null) => (size === null || !initial ? null : percentOf(size, initial))
  const band = finding?.band ?? null
  return {
    readingIds: group.map((one) => one.id),
    attribute: attribute.key,
    label: attribute.label,
    unit: attribute.unit,
    decimals: attribute.decimals,
    words: attribute.words,
    value,
    expected,
    difference,
    differencePercent: inPercent(difference),
    scatterPercent: inPercent(finding?.trend?.sd ?? null),
    initial,
    band,
    isBeyond: band !== null && isBeyondBand(band, value),
    standing: row.standing,
    studyCode: row.studyCode,
    batchCode: row.batchCode,
    stationName: row.stationName,
    temperatureC: row.temperatureC,
    isFreezeThaw: row.isFreezeThaw,
    jarCode: row.jarCode,
    measuredAt: row.measuredAt,
    isFlagged:
      row.studyCode === flag.studyCode &&
      row.batchId === flag.batchId &&
      row.studyStationId === flag.studyStationId &&
      row.attribute === flag.attribute,
  }
}
