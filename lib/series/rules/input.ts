import { attributeOf, startsAtZero, type AttributeKey } from '@/lib/reading/schema/attributes'
import { pulledFor } from '@/lib/protocol/rules/plan'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { mean } from '@/lib/science/mean'
import { weeksSince } from '@/lib/science/months'
import { phaseFraction } from '@/lib/science/phase-fraction'
import { rulerPercent, separationDetectionLimit } from '@/lib/science/separation'
import type { ReadingDoubt, SeriesInput, SeriesReading } from '@/lib/science/series'
import { dayIn } from '@/lib/study/rules/calendar'
import type { EntryDoubt, Frame, FrameBatch, FrameFlag, FrameReading, FrameStation } from '../queries/frame'
import { isOnShiftedDay, type ShiftedDay } from './shifted-day'

/** The replicates of one attribute that one jar gave in one pull. */
export type JarReading = {
  id: string
  ids: string[]
  rows: FrameReading[]
  doubts: EntryDoubt[]
  day: string
}

/** One series with what its readings are called in the record. */
export type Unit = {
  batch: FrameBatch
  station: FrameStation
  attribute: AttributeKey
  input: SeriesInput
  jars: JarReading[]
}

/** What the rules are given, per batch, station and attribute of the study's plan. */
export function seriesUnits(
  frame: Frame,
  only: ReadonlySet<string> | null,
  shifted: readonly ShiftedDay[],
): Unit[] {
  const units: Unit[] = []
  for (const batch of frame.study.batches) {
    for (const planned of pulledFor(frame.study.plan)) {
      if (only && !only.has(planned.attribute)) continue
      const initial = initialOf(frame, batch.id, planned.attribute)
      if (initial.length === 0) continue
      const s = repeatabilitySd(planned, batch, mean(initial), frame.study.plan.fillHeightMm)
      for (const station of frame.study.stations) {
        const jars = jarReadings(frame, batch.id, station.id, planned.attribute)
        units.push({
          batch,
          station,
          attribute: planned.attribute,
          jars,
          input: {
            attribute: planned.attribute,
            tolerance: planned.tolerance,
            endTime: frame.study.endWeeks,
            repeatabilitySd: s,
            isSeparation: planned.attribute === 'separation',
            ...(planned.attribute === 'separation'
              ? { detectionLimit: separationDetectionLimit(frame.study.plan.fillHeightMm, planned.rulerMm) }
              : {}),
            initial,
            initialTime: 0,
            readings: jars.map((jar) => seriesReading(frame, jar, jars, shifted)),
          },
        })
      }
    }
  }
  return units
}

/** SD of one replicate in the unit of the attribute; the method of a high internal phase scatters more. */
export function repeatabilitySd(
  planned: Pick<PlannedAttribute, 'attribute' | 'own'>,
  batch: FrameBatch,
  initial: number,
  fillHeightMm: number,
): number {
  // A ruler reads a millimetre, whatever the jar's height.
  if (planned.attribute === 'separation') return rulerPercent(fillHeightMm)
  const { kind, sd, highInternalPhaseSd } = attributeOf(planned.attribute, planned).repeatability
  const ofMethod = isHighInternalPhase(batch) ? highInternalPhaseSd : sd
  return kind === 'relative' ? ofMethod * Math.abs(initial) : ofMethod
}

/**
 * Replicates of the batch's own initial. Where the protocol asks for none (an absolute range), the first reading of
 * the batch stands for it.
 */
export function initialOf(frame: Frame, batchId: string, attribute: AttributeKey): number[] {
  const own = frame.readings.filter(
    (r) => r.batchId === batchId && r.attribute === attribute && r.value !== null,
  )
  const initial = own.filter((r) => r.studyStationId === null)
  if (initial.length > 0) return initial.map((r) => r.value!)
  if (startsAtZero(attributeOf(attribute, frame.study.plan))) return [0]
  const planned = frame.study.plan.attributes.find((one) => one.attribute === attribute)
  const [first] = own
  if (planned?.tolerance.kind !== 'range' || !first) return []
  return own.filter((r) => r.pullJarId === first.pullJarId).map((r) => r.value!)
}

/** What a difference is told from: how the batch's own initial was come by, and what its emulsion is. */
export function startOf(frame: Frame, batchId: string, attribute: string) {
  const initial = frame.readings.find(
    (r) => r.batchId === batchId && r.attribute === attribute && r.studyStationId === null,
  )
  const batch = frame.study.batches.find((one) => one.id === batchId)
  return { initial: initial?.detail ?? null, emulsionType: batch?.emulsionType ?? null }
}

function isHighInternalPhase(batch: FrameBatch): boolean {
  return batch.lines.length > 0 && phaseFraction({ lines: batch.lines }).highInternalPhase
}

function jarReadings(frame: Frame, batchId: string, studyStationId: string, attribute: string): JarReading[] {
  const byJar = new Map<string, FrameReading[]>()
  for (const row of frame.readings) {
    if (row.batchId !== batchId || row.studyStationId !== studyStationId || row.attribute !== attribute)
      continue
    if (row.value === null) continue
    const key = row.pullJarId ?? row.id
    byJar.set(key, [...(byJar.get(key) ?? []), row])
  }
  return [...byJar.values()].map((rows) => {
    const [first] = rows as [FrameReading]
    return {
      id: first.id,
      ids: rows.map((row) => row.id),
      rows,
      doubts: rows.flatMap((row) => row.doubts),
      day: first.dueOn ?? dayIn(frame.study.zone, first.measuredAt),
    }
  })
}

function seriesReading(
  frame: Frame,
  jar: JarReading,
  all: readonly JarReading[],
  shifted: readonly ShiftedDay[],
): SeriesReading {
  const [first] = jar.rows as [FrameReading]
  const flags = frame.flags.filter((flag) => flag.readingId !== null && jar.ids.includes(flag.readingId))
  const repeated = first.repeatOf && all.find((other) => other.rows[0]!.pullJarId === first.repeatOf)
  const shift = shifted.find((day) => isOnShiftedDay(day, first, frame.study.zone))
  return {
    id: jar.id,
    time: Math.max(0, weeksSince(frame.study.startedAt, first.measuredAt)),
    day: jar.day,
    jar: first.jarCode ?? first.jarId ?? '',
    values: jar.rows.map((row) => row.value!),
    doubts: [
      ...doubtsOf(jar, flags),
      // A turned emulsion is out whatever the numbers say [book]: it waits for no repeat.
      ...(first.attribute === 'type' ? [{ reason: 'out', settled: true }] : []),
      ...(shift ? [{ reason: shift.reason, settled: shift.settles === 'doubt' }] : []),
    ],
    ...(repeated ? { isRepeatOf: repeated.id } : {}),
    ...(flags.some((flag) => flag.settles === 'reading') || shift?.settles === 'reading'
      ? { isSetAside: true }
      : {}),
  }
}

/** What was found at the entry, and what the rules themselves may find, with what a person set aside. */
function doubtsOf(jar: JarReading, flags: FrameFlag[]): ReadingDoubt[] {
  const settled = new Set(flags.filter((flag) => flag.settles === 'doubt').map((flag) => flag.rule))
  const found = new Set(jar.doubts.map((doubt) => doubt.reason))
  return [
    ...[...found].map((reason) => ({ reason, settled: settled.has(reason) })),
    ...[...settled].filter((rule) => !found.has(rule)).map((reason) => ({ reason, settled: true })),
  ]
}
