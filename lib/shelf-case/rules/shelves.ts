import { nominalMonths } from '@/lib/science/months'
import { separation } from '@/lib/science/separation'
import type { ShelfEvidence } from '@/lib/shelf-case/rules/content'
import { driftCalculation } from '@/lib/shelf-case/rules/drift-calculation'
import type { Evidence } from '@/lib/shelf-case/queries/evidence'

/** Separation at every station, jar by jar, with what each is drawn from. */
export function shelvesOf(evidence: Evidence): ShelfEvidence[] {
  return evidence.stations.flatMap((s) =>
    evidence.batches.flatMap((b) => {
      const found = evidence.series.find(
        (x) => x.studyStationId === s.id && x.batchId === b.id && x.attribute === 'separation',
      )
      if (!found) return []
      return {
        label: s.isFreezeThaw ? 'freeze-thaw' : `${s.temperatureC}`,
        temperatureC: s.temperatureC,
        isFreezeThaw: s.isFreezeThaw,
        voice: s.voice,
        batch: b.code,
        jars: found.finding.points.map((p) => ({
          months: nominalMonths(p.time),
          ...layersOf(evidence.readings.filter((r) => rowsOf(found, p.readingIds).includes(r.id))),
          percent: p.mean,
          standing: p.standing,
        })),
        calc: driftCalculation(found.input),
      }
    }),
  )
}

/** The layers of the worst jar of a pull, as they are drawn. */
function layersOf(readings: Evidence['readings']) {
  const worst = readings.toSorted((x, y) => (y.value ?? 0) - (x.value ?? 0))[0]
  const mm = (key: string) => (typeof worst?.detail[key] === 'number' ? (worst.detail[key] as number) : 0)
  const input = { totalMm: mm('totalMm'), topMm: mm('topMm'), bottomMm: mm('bottomMm') }
  if (input.totalMm <= 0) return { topPercent: 0, bottomPercent: worst?.value ?? 0, calc: null }
  const output = separation(input)
  const { topPercent, bottomPercent } = output
  return { topPercent, bottomPercent, calc: { topic: 'separation' as const, input, output } }
}

/** Rows of the record behind the readings that the rules name. */
export function rowsOf({ rowIds }: Evidence['series'][number], ids: string[]): string[] {
  return ids.flatMap((id) => rowIds.get(id) ?? [id])
}
