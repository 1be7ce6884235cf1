import { cycleDoubts } from '@/lib/cycle/rules/shortfall'
import { AppError } from '@/lib/http/errors'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { valueDoubts, type EntryDoubt } from '@/lib/reading/rules/entry-doubts'
import { usedDoubts } from '@/lib/reading/rules/used-doubts'
import { weeksSince } from '@/lib/science/months'
import type { Frame } from '@/lib/series/queries/frame'
import { seriesUnits } from '@/lib/series/rules/input'
import { sentenceContext, stationWords } from '@/lib/series/rules/spoken'
import { placeDoubts } from '@/lib/station/rules/moves'
import type { PullJar } from '../queries/pull-jar'
import type { ReadEntry } from './read-entries'

/** One thing that the person is asked about before it is taken. */
export type Question = { field: string; attribute: string; readingId: string | null; sentence: string }
export type Doubted = Map<string, EntryDoubt[]>

type Judged = { doubts: Doubted; questions: Question[] }

/** What speaks against each entry (by its id), and what of that the person has to say is so. */
export function judgeEntries(
  jar: PullJar,
  frame: Frame,
  entries: readonly ReadEntry[],
  measuredAt: string,
): Judged {
  const doubts: Doubted = new Map()
  const questions: Question[] = []
  const keys = new Set<AttributeKey>(entries.map(({ entry }) => entry.attribute))
  const units = seriesUnits(frame, keys, [])
  const station = frame.study.stations.find((one) => one.id === jar.studyStationId)!
  const planned = jar.plan.stations[jar.position]
  // What is told late, from paper or without network, is doubted by what lay before it.
  const halves = jar.cycleHalves.filter((half) => Date.parse(half.endedAt) < Date.parse(measuredAt))
  const common = [
    ...(jar.isFreezeThaw ? cycleDoubts(jar, halves, planned?.cycle) : []),
    ...placeDoubts(
      { ...jar, kind: jar.stationKind, isLit: planned?.light !== undefined },
      jar.stays,
      measuredAt,
      frame.study.zone,
    ),
  ]
  if (jar.kind === 'retain') {
    common.push({
      reason: 'place',
      sentence: `Jar ${jar.code} is a retain: it was not kept at ${stationWords(station)} until this pull. Say whether it counts.`,
    })
  }
  for (const key of keys) {
    const own = entries.filter(({ entry }) => entry.attribute === key)
    const unit = units.find(
      (one) => one.batch.id === jar.batchId && one.station.id === jar.studyStationId && one.attribute === key,
    )
    const ofValue = unit
      ? valueDoubts(
          { ...unit.input, readings: unit.input.readings.filter((reading) => reading.day !== jar.dueOn) },
          {
            time: Math.max(0, weeksSince(frame.study.startedAt, measuredAt)),
            values: own.map(({ read }) => read.value),
            isRepeat: jar.asks === 'repeat',
            ...weakestTorque(own),
          },
          sentenceContext(frame.study, station, key),
        )
      : []
    for (const { entry, path, planned: asked, instrument, read } of own) {
      const found = [
        ...ofValue.map(({ reason, sentence }) => ({ reason, sentence })),
        ...usedDoubts({
          ...{ instrument, detail: read.detail, initial: initialDetail(frame, jar, key), planned: asked },
          ...{ measuredAt, zone: frame.study.zone },
        }),
        ...common,
      ]
      if (found.length > 0) doubts.set(entry.id, found)
      if (entry.isConfirmed) continue
      for (const { sentence } of ofValue) {
        questions.push({ field: `${path}.typed`, attribute: key, readingId: entry.id, sentence })
      }
    }
  }
  return { doubts, questions }
}

/** Asks once, about everything at a time: what is unlikely, and what is missing. */
export function askFirst(questions: Question[], missing: readonly string[]): void {
  const open = missing.map((key): Question => {
    const label = attributeName(key)
    return {
      field: `missing.${key}`,
      attribute: key,
      readingId: null,
      sentence: `${label} is not read yet. Read it, or say that it is left out.`,
    }
  })
  const all = [...questions, ...open]
  const [first] = all
  if (!first) return
  const more = all.length > 1 ? ` ${all.length - 1} more to confirm.` : ''
  throw new AppError(409, 'confirm', `${first.sentence} Is it so?${more}`, {
    fields: Object.fromEntries(all.map(({ field, sentence }) => [field, sentence])),
    detail: { questions: all },
  })
}

function weakestTorque(entries: readonly ReadEntry[]): { torquePercent?: number } {
  const torques = entries.flatMap(({ read }) =>
    typeof read.detail['torquePercent'] === 'number' ? [read.detail['torquePercent']] : [],
  )
  if (torques.length === 0) return {}
  return { torquePercent: torques.find((torque) => torque > 100) ?? Math.min(...torques) }
}

function initialDetail(frame: Frame, jar: PullJar, attribute: string) {
  const initial = frame.readings.find(
    (row) => row.studyStationId === null && row.batchId === jar.batchId && row.attribute === attribute,
  )
  return initial?.detail ?? null
}
