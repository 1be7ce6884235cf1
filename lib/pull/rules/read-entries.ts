import { refuse } from '@/lib/http/errors'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { plannedFor } from '@/lib/bench/rules'
import { attributeName } from '@/lib/reading/schema/attributes'
import type { Entry } from '@/lib/reading/schema/entry'
import { wrongInstrument } from '@/lib/reading/rules/instrument-kind'
import { ImpossibleEntry, type EntryValue } from '@/lib/reading/rules/impossible-entry'
import { valueOf } from '@/lib/reading/rules/value'
import type { Frame } from '@/lib/series/queries/frame'
import { startOf } from '@/lib/series/rules/input'
import type { UsedInstrument } from '@/lib/instrument/queries/used'
import type { PullJar } from '../queries/pull-jar'

export type ReadEntry = {
  entry: Entry
  /** Where in the request it stands: `readings.2`. */
  path: string
  planned: PlannedAttribute
  instrument: UsedInstrument | null
  read: EntryValue
}

/** Values of all fields of a jar that are new, or one refusal that names each field that cannot be so. */
export function readEntries(jar: PullJar, frame: Frame, entries: readonly Entry[]): ReadEntry[] {
  const kept = new Set(jar.keptEntries.map((one) => one.id))
  const planned = plannedFor(jar)
  const fields: Record<string, string> = {}
  const seen = new Set<string>()
  const read = entries.flatMap((entry, index): ReadEntry[] => {
    const path = `readings.${index}`
    const asked = planned.find((one) => one.attribute === entry.attribute)
    const label = attributeName(entry.attribute)
    const name = `${entry.attribute} ${entry.replicate}`
    if (!asked) {
      fields[`${path}.typed`] = `${label} is not asked of this jar. Leave it out.`
      return []
    }
    if (seen.has(name)) {
      fields[`${path}.replicate`] =
        `${label} stands twice as replicate ${entry.replicate}. Number them 1, 2, 3.`
      return []
    }
    seen.add(name)
    if (kept.has(entry.id)) return []
    const instrument = jar.instruments.find((one) => one.id === entry.instrumentId) ?? null
    if (entry.instrumentId && !instrument) {
      fields[`${path}.instrumentId`] = 'There is no such instrument. Choose one from the list.'
      return []
    }
    const wrong = instrument && wrongInstrument({ attribute: entry.attribute, label }, instrument)
    if (wrong) {
      fields[`${path}.instrumentId`] = wrong
      return []
    }
    try {
      const value = valueOf(entry, {
        planned: asked,
        jar: { ...jar, fillHeightMm: jar.fillHeightMm ?? jar.plan.fillHeightMm },
        spindles: instrument?.spindles ?? [],
        last: lastValue(frame, jar, entry),
        ...startOf(frame, jar.batchId, entry.attribute),
      })
      return [{ entry, path, planned: asked, instrument, read: value }]
    } catch (error) {
      if (!(error instanceof ImpossibleEntry)) throw error
      fields[`${path}.${error.field}`] = error.sentence
      return []
    }
  })
  const [first] = Object.values(fields)
  if (first !== undefined) {
    const more = Object.keys(fields).length - 1
    throw refuse.invalid(more > 0 ? `${first} ${more} more like it.` : first, fields)
  }
  return read
}

/** What the protocol asks for, is not there, and was not said to be left out. */
export function missingAttributes(
  jar: PullJar,
  entries: readonly { attribute: string }[],
  leaveOut: readonly string[] = [],
): string[] {
  return plannedFor(jar)
    .map((planned) => planned.attribute)
    .filter((key) => !leaveOut.includes(key) && !entries.some((entry) => entry.attribute === key))
}

/** Every replicate of everything that the protocol asks of this jar is on record. */
export function isAllRead(
  jar: PullJar,
  entries: readonly { attribute: string; replicate: number }[],
): boolean {
  return plannedFor(jar).every((planned) => {
    const read = new Set(
      entries.filter((one) => one.attribute === planned.attribute).map((one) => one.replicate),
    )
    return read.size >= (jar.asks === 'watch' ? 1 : planned.replicates)
  })
}

function lastValue(frame: Frame, jar: PullJar, entry: Entry): number | null {
  const row = frame.readings.findLast(
    (one) =>
      one.attribute === entry.attribute &&
      one.batchId === jar.batchId &&
      (one.studyStationId === jar.studyStationId || one.studyStationId === null),
  )
  return row?.value ?? null
}
