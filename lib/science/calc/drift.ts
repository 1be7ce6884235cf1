import { isBeyondBand, toleranceBand } from '../band'
import { assessSeries } from '../drift'
import { assertNumbers, assertSameLength, ScienceError } from '../guard'
import { instrumentDay } from '../instrument-day'
import { mean } from '../mean'
import type { SeriesInput, SeriesReading, Tolerance } from '../series'
import { examples } from './examples'
import {
  choice,
  fieldsOf,
  given,
  has,
  list,
  number,
  numbers,
  object,
  optionalNumber,
  optionalReplicate,
  replicates,
  text,
  type Fields,
} from './read'
import { topic } from './topic'

export const driftTopic = topic({
  name: 'drift',
  says: 'Where a series stands: band, standing, trend, flags and doubts',
  input:
    '{times:[], values:[], initial?, tolerance:{kind, lower?, upper?, below?, above?}, endTime, repeatabilitySd?:0, coldest?:{times, values}, detectionLimit?, settled?:[{time, rule}]}',
  output:
    '{band:{lower, upper}, standing, used, slope, slopeP, leavesAt, leavesAtLow, leavesAtHigh, rules:[{rule, level, at, evidence}]}',
  notes:
    'A time given again is a repeat on a spare jar; with initial an entry at time 0 is left out. One side of the tolerance left out means one-sided. With detectionLimit the series is separation: lists are jars, and the worst counts.',
  example: examples.drift,
  read: readSeries,
  compute: (input) => {
    const { band, standing, used, latest, slope, slopeP, leavesAt, leavesAtLow, leavesAtHigh, rules } =
      assessSeries(input)
    return {
      band,
      standing,
      // Where nothing but the initial counts, that is the latest mean.
      used: latest === null ? 0 : used,
      slope,
      slopeP,
      leavesAt,
      leavesAtLow,
      leavesAtHigh,
      rules: rules.map(({ rule, level, at, evidence }) => ({ rule, level, at, evidence })),
    }
  },
})

export const instrumentDayTopic = topic({
  name: 'instrument-day',
  says: 'Whether one instrument read high or low everywhere on one day',
  input: '{stations:[{name, temperatureC, times:[], values:[]}], at, repeatabilitySd}',
  output:
    '{shift, direction:"high"|"low"|null, median, evidence:{residuals:[{name, temperatureC, residual}], beyondOne, coldestMean}}',
  notes:
    'A shift is a median above 2.25 over at least three stations, at least three of them beyond 1 and the two coldest above 1.75 on average, all of one sign.',
  example: examples['instrument-day'],
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['stations', 'at', 'repeatabilitySd'])
    return {
      stations: list(fields, 'stations', (item, path) => {
        const station = fieldsOf(item, path, ['name', 'temperatureC', 'times', 'values'])
        return {
          name: text(station, 'name'),
          temperatureC: number(station, 'temperatureC'),
          times: numbers(station, 'times'),
          values: replicates(station, 'values').map(mean),
        }
      }),
      at: number(fields, 'at'),
      repeatabilitySd: number(fields, 'repeatabilitySd'),
    }
  },
  compute: (input) => {
    const { shift, direction, median, evidence } = instrumentDay(input)
    return { shift, direction, median, evidence }
  },
})

export function readSeries(raw: unknown): SeriesInput {
  const fields = fieldsOf(raw, '', [
    'times',
    'values',
    'initial',
    'tolerance',
    'endTime',
    'repeatabilitySd',
    'coldest',
    'detectionLimit',
    'settled',
  ])
  const times = numbers(fields, 'times')
  const values = replicates(fields, 'values')
  assertSameLength('times', times, 'values', values)
  assertNumbers('times', times, 1)
  const entries = times.map((time, i) => ({ time, values: values[i]! })).sort((a, b) => a.time - b.time)
  const stated = optionalReplicate(fields, 'initial')
  const first = entries[0]!
  const initialTime = stated ? Math.min(0, first.time) : first.time
  const initial = stated ?? first.values
  const detectionLimit = optionalNumber(fields, 'detectionLimit')
  const tolerance = readTolerance(object(fields, 'tolerance', ['kind', 'lower', 'upper', 'below', 'above']))
  const repeatabilitySd = optionalNumber(fields, 'repeatabilitySd') ?? 0
  if (repeatabilitySd < 0) throw new ScienceError('repeatabilitySd', 'must not be negative')
  const start = mean(initial)
  if (isBeyondBand(toleranceBand(tolerance, start), start)) {
    throw new ScienceError('initial', `${start} lies outside its own band`)
  }
  return {
    attribute: 'value',
    tolerance,
    endTime: number(fields, 'endTime'),
    repeatabilitySd,
    isSeparation: detectionLimit !== undefined,
    ...given({ detectionLimit }),
    initial,
    initialTime,
    readings: readingsOf(
      stated ? entries.filter((e) => e.time !== 0) : entries.slice(1),
      detectionLimit !== undefined,
      has(fields, 'settled') ? list(fields, 'settled', readSettled) : [],
    ),
    ...(has(fields, 'coldest') ? { coldest: readColdest(fields, initialTime) } : {}),
  }
}

/** Entries of one time make one day: the first is the pull, what follows are its repeats. */
function readingsOf(
  entries: { time: number; values: number[] }[],
  areJars: boolean,
  settled: { time: number; rule: string }[],
): SeriesReading[] {
  const firstAt = new Map<number, string>()
  return entries.flatMap((entry, i) => {
    const repeatOf = firstAt.get(entry.time)
    if (repeatOf === undefined) firstAt.set(entry.time, `${i}.0`)
    const jars = areJars ? entry.values.map((value) => [value]) : [entry.values]
    return jars.map((values, jar) => ({
      id: `${i}.${jar}`,
      time: entry.time,
      day: String(entry.time),
      jar: `${i}.${jar}`,
      values,
      doubts: settled
        .filter(({ time }) => time === entry.time)
        .map(({ rule }) => ({ reason: rule, settled: true })),
      ...(repeatOf === undefined ? {} : { isRepeatOf: repeatOf }),
    }))
  })
}

function readColdest(fields: Fields, initialTime: number) {
  const coldest = object(fields, 'coldest', ['times', 'values'])
  const times = numbers(coldest, 'times')
  const values = replicates(coldest, 'values').map(mean)
  assertSameLength('coldest.times', times, 'coldest.values', values)
  const kept = times
    .map((_, i) => i)
    .filter((i) => times[i] !== initialTime)
    .sort((a, b) => times[a]! - times[b]!)
  return { times: kept.map((i) => times[i]!), values: kept.map((i) => values[i]!) }
}

function readSettled(raw: unknown, path: string) {
  const fields = fieldsOf(raw, path, ['time', 'rule'])
  return { time: number(fields, 'time'), rule: choice(fields, 'rule', ['jump', 'spread', 'out']) }
}

function readTolerance(fields: Fields): Tolerance {
  const kind = choice(fields, 'kind', ['range', 'percent', 'shift'])
  const wrong = kind === 'range' ? ['below', 'above'] : ['lower', 'upper']
  for (const key of wrong) {
    if (has(fields, key)) throw new ScienceError(`${fields.path}.${key}`, `does not belong to kind "${kind}"`)
  }
  return kind === 'range'
    ? { kind, ...given({ lower: optionalNumber(fields, 'lower'), upper: optionalNumber(fields, 'upper') }) }
    : { kind, ...given({ below: optionalNumber(fields, 'below'), above: optionalNumber(fields, 'above') }) }
}
