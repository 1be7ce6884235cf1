import { mean, rangeOf } from './mean'
import type { SeriesInput, SeriesReading } from './series'

/** What one jar, or the jars of one pull together, gave: a mean and the number of values behind it. */
export type Measurement = {
  mean: number
  replicates: number
  range: number
  readingIds: string[]
  /** Doubts of our own rules that a person set aside. */
  settled: Set<string>
}

/** All readings that make one point: the pull's own jars first, then each repeat on a spare jar. */
export type PullDay = {
  day: string
  time: number
  readings: SeriesReading[]
  measurements: Measurement[]
  /** Reasons of readings that take no part. */
  doubts: string[]
}

/** Doubts the rules find themselves; given back unsettled they are found again instead of believed. */
const ownDoubts = new Set(['jump', 'spread', 'out'])

/** Readings by day of pull, in time order; a repeat belongs to the day of the reading it repeats. */
export function pullDays(input: Pick<SeriesInput, 'readings' | 'isSeparation'>): PullDay[] {
  const byId = new Map(input.readings.map((reading) => [reading.id, reading]))
  const groups = new Map<string, { reading: SeriesReading; isRepeat: boolean }[]>()
  for (const reading of input.readings) {
    const root = rootOf(reading, byId)
    const group = groups.get(root.day) ?? []
    group.push({ reading, isRepeat: root !== reading })
    groups.set(root.day, group)
  }
  return [...groups]
    .map(([day, group]) => pullDay(day, group, input.isSeparation))
    .sort((a, b) => a.time - b.time)
}

function rootOf(reading: SeriesReading, byId: Map<string, SeriesReading>): SeriesReading {
  const seen = new Set<string>()
  let root = reading
  while (root.isRepeatOf !== undefined && !seen.has(root.id)) {
    seen.add(root.id)
    const parent = byId.get(root.isRepeatOf)
    // A repeat of a reading that was corrected or voided stands for itself.
    if (parent === undefined) return root
    root = parent
  }
  return root
}

function pullDay(
  day: string,
  group: { reading: SeriesReading; isRepeat: boolean }[],
  isSeparation: boolean,
): PullDay {
  const readings = group.map((g) => g.reading)
  const firsts = group.filter((g) => !g.isRepeat).map((g) => g.reading)
  const pulled = firsts.filter(isUsable)
  const repeats = group.filter((g) => g.isRepeat && isUsable(g.reading)).map((g) => g.reading)
  const measurements = repeats.map((reading) => measurementOf([reading]))
  if (pulled.length > 0) measurements.unshift(isSeparation ? worstOf(pulled) : measurementOf(pulled))
  return {
    day,
    time: (firsts[0] ?? readings[0]!).time,
    readings,
    measurements,
    doubts: [...new Set(readings.flatMap(reasonsAgainst))],
  }
}

export function isUsable(reading: SeriesReading): boolean {
  return reasonsAgainst(reading).length === 0
}

const noReasons: readonly string[] = []

function reasonsAgainst(reading: SeriesReading): readonly string[] {
  if (reading.isSetAside) return ['set aside with a laboratory cause']
  if (reading.doubts.length === 0) return noReasons
  return reading.doubts.filter((d) => !d.settled && !ownDoubts.has(d.reason)).map((d) => d.reason)
}

function measurementOf(readings: SeriesReading[]): Measurement {
  const values = readings.length === 1 ? readings[0]!.values : readings.flatMap((reading) => reading.values)
  return {
    mean: mean(values),
    replicates: values.length,
    range: rangeOf(values),
    readingIds: readings.map((reading) => reading.id),
    settled: new Set(readings.flatMap((r) => r.doubts.filter((d) => d.settled).map((d) => d.reason))),
  }
}

/** Of several watch jars the worst counts [practice]. */
function worstOf(readings: SeriesReading[]): Measurement {
  const jars = readings.map((reading) => measurementOf([reading]))
  return jars.reduce((worst, jar) => (jar.mean > worst.mean ? jar : worst))
}
