import { toleranceBand } from '../../science/band'
import { instrumentDay } from '../../science/instrument-day'
import { mean } from '../../science/mean'
import { onsetOf } from '../../science/onset'
import { pullDays, type PullDay } from '../../science/pull-day'
import { spreadOf } from '../../science/plausible'
import type { SeriesReading, Standing } from '../../science/series'
import { startWalk, stepDay, type Walk } from '../../science/walk'
import type { Chance } from './chance'
import { dayErrors, measured, missingPulls, stations, type Method } from './lab'

/** What the emulsion truly is at a station after so many weeks, as a distance from its start. */
export type Truth = (station: number, week: number) => number

export type RunInput = {
  chance: Chance
  method: Method
  /** How long the study is planned. */
  weeks: number
  /** The last week that is of interest. */
  until?: number
  truth: Truth
  /** One day on which the instrument read so many SDs high (or low, negative). */
  offDay?: { week: number; by: number }
}

export type NamedDay = { week: number; direction: 'high' | 'low' }

/** One attribute of one study, as it stood at the end of each of its days. */
export type Run = {
  /** [station][week − 1] */
  standings: Standing[][]
  /** Weeks on which an edge flag was open. */
  edges: boolean[][]
  /** Week of the onset flag, per station. */
  onsets: (number | null)[]
  named: NamedDay[]
  /** How each series stood at its end. */
  walks: readonly Walk[]
}

const shiftDoubt = 'common shift'
/** Viscosity builds everywhere within 14 days of making: a shift is then only a note. */
const buildingWeeks = 2

/**
 * A study of one attribute, lived week by week with the rules the application uses: jars read, doubts answered by
 * repeats of the same day, the instrument's day judged, readings of an off day taken again, standings at its end.
 */
export function runStudy(input: RunInput): Run {
  const { chance, method, weeks, until = weeks } = input
  const errors = dayErrors(chance, until)
  const initials = measuredInitial(chance, method, errors[0]!)
  const initial = mean(initials)
  const band = toleranceBand(method.tolerance, initial)
  const s = method.isRelative ? (method.repeatability / method.start) * initial : method.repeatability
  const frame = { endTime: weeks, repeatabilitySd: s, initial: initials, initialTime: 0 }
  // The comparison with the coldest station needs its latest points, so it is put in at each step.
  const alone: Walk[] = stations.map(() => startWalk(frame, initial, band))
  const walks: Walk[] = alone.slice()
  const days: PullDay[][] = stations.map(() => [])
  const marks: { times: number[]; values: number[] }[] = stations.map(() => ({ times: [], values: [] }))
  const run: Run = {
    standings: stations.map(() => []),
    edges: stations.map(() => []),
    onsets: stations.map(() => null),
    named: [],
    walks,
  }

  for (let week = 1; week <= until; week++) {
    const off = input.offDay?.week === week ? input.offDay.by : 0
    const present = stations.map(() => !chance.happens(missingPulls))
    const read = (station: number, shift: number) =>
      measured(chance, method, method.start + input.truth(station, week), errors[week]! + shift)
    let today = stations.map((_, i) =>
      present[i] ? takeDay(alone[i]!, week, method, () => read(i, off), null) : null,
    )
    const shift = namedShift(method, marks, today, week, s)
    if (shift !== null) {
      run.named.push({ week, direction: shift })
      today = today.map((taken, i) =>
        taken ? takeDay(alone[i]!, week, method, () => read(i, 0), taken.day.readings) : null,
      )
    }
    today.forEach((taken, i) => {
      if (taken === null) return
      alone[i] = taken.walk
      if (method.detectionLimit !== undefined) days[i]!.push(taken.day)
      const point = latestOf(taken.walk)
      if (!point.counted) return
      marks[i]!.times.push(week)
      marks[i]!.values.push(point.mean)
    })
    today.forEach((taken, i) => {
      if (taken === null) return
      // Who does not lean alone does not lean against the coldest station either.
      walks[i] =
        taken.walk.lean === null
          ? taken.walk
          : stepDay(besideColdest(walks[i]!, alone[i === 0 ? 1 : 0]!), taken.day)
    })
    walks.forEach((walk, i) => {
      run.standings[i]!.push(walk.standing)
      run.edges[i]!.push(walk.edge !== null)
      if (method.detectionLimit === undefined || run.onsets[i] !== null || !today[i]) return
      // Before today it had not begun, so it has begun today or not yet.
      if (isAbove(today[i].day, method.detectionLimit) && onsetOf(days[i]!, method.detectionLimit)) {
        run.onsets[i] = week
      }
    })
  }
  return run
}

/** By definition nothing has separated yet at the start; replicates that lie too far apart are measured again. */
function measuredInitial(chance: Chance, method: Method, instrument: number): number[] {
  if (method.attribute === 'separation') return [0]
  for (;;) {
    const values = measured(chance, method, method.start, instrument)
    const range = Math.max(...values) - Math.min(...values)
    const candidate = { time: 0, mean: mean(values), replicates: values.length, range }
    if (spreadOf(candidate, method.repeatability) === null) return values
  }
}

type Taken = { day: PullDay; walk: Walk }

function latestOf(walk: Walk) {
  return walk.points[walk.points.length - 1]!
}

/** Reads a jar and answers each doubt with a repeat on a spare, a third one where two differ. */
function takeDay(
  walk: Walk,
  week: number,
  method: Method,
  read: () => number[],
  offReadings: readonly SeriesReading[] | null,
): Taken {
  const readings: SeriesReading[] = (offReadings ?? []).map((reading) => ({
    ...reading,
    doubts: [{ reason: shiftDoubt, settled: false }],
  }))
  for (let jar = 1; ; jar++) {
    const first = readings[0]
    readings.push({
      id: `${readings.length}`,
      time: week,
      day: String(week),
      jar: `${readings.length}`,
      values: read(),
      doubts: [],
      ...(first ? { isRepeatOf: first.id } : {}),
    })
    const [day] = pullDays({ readings, isSeparation: method.attribute === 'separation' })
    const stepped = stepDay(walk, day!)
    if (latestOf(stepped).counted || jar === 3) return { day: day!, walk: stepped }
  }
}

/** Whether the instrument was off, from what counts of the day and of those before it. */
function namedShift(
  method: Method,
  marks: readonly { times: number[]; values: number[] }[],
  today: readonly (Taken | null)[],
  week: number,
  s: number,
): 'high' | 'low' | null {
  if (method.attribute === 'separation') return null
  if (method.attribute === 'viscosity' && week <= buildingWeeks) return null
  const found = instrumentDay({
    stations: stations.flatMap((station, i) => {
      const point = today[i] && latestOf(today[i].walk)
      if (station.isFreezeThaw || !point?.counted) return []
      return [
        {
          name: station.name,
          temperatureC: station.temperatureC,
          times: [...marks[i]!.times, week],
          values: [...marks[i]!.values, point.mean],
        },
      ]
    }),
    at: week,
    repeatabilitySd: s,
  })
  return found.shift ? found.direction : null
}

function isAbove(day: PullDay, limit: number): boolean {
  return day.readings.some((reading) => reading.values.some((value) => value > limit))
}

/** The coldest station other than its own shares instrument and day with a series, not the heat. */
function besideColdest(walk: Walk, coldest: Walk): Walk {
  const points = coldest.counted.filter((point) => !point.isInitial)
  return {
    ...walk,
    frame: {
      ...walk.frame,
      coldest: {
        times: points.map((point) => point.time),
        values: points.map((point) => point.mean),
        days: points.map((point) => point.day!),
      },
    },
  }
}
