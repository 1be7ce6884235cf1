import { separationCurve } from '../../../science/separation-curve'
import { hottest, shareOfHottest, type Method } from '../lab'
import { runStudy } from '../run'
import type { Figure } from './figure'

/** Separation at the hottest station: nothing until `lag`, then rising at first by `rate` points a week. */
type Course = { lag: number; rate: number; plateau: number | null }

function percentAt({ lag, rate, plateau }: Course, aged: number): number {
  const since = aged - lag
  if (since <= 0) return 0
  return plateau === null ? Math.min(100, rate * since) : plateau * (1 - Math.exp((-rate / plateau) * since))
}

/** Week in which the hottest station truly passes a level; null where it never does. */
function passes({ lag, rate, plateau }: Course, level: number): number | null {
  if (plateau === null) return lag + level / rate
  return plateau > level ? lag - (plateau / rate) * Math.log(1 - level / plateau) : null
}

/** Separation that starts after a lag: how many pulls lie between the flag that it has begun and leaving the band. */
export function afterLag(name: string, method: Method, weeks: number, studies: number): Figure {
  const detection = method.detectionLimit!
  return {
    name,
    studies,
    study: (chance, count) => {
      const course: Course = {
        lag: chance.between(4, 14),
        rate: chance.between(0.5, 3),
        plateau: chance.happens(0.5) ? chance.between(8, 20) : null,
      }
      const begins = passes(course, detection)!
      const leaves = passes(course, method.room)!
      if (leaves > weeks) return
      const run = runStudy({
        chance,
        method,
        weeks,
        truth: (station, week) => percentAt(course, week * shareOfHottest(station)),
      })
      const out = run.standings[hottest]!.indexOf('out') + 1
      const onset = run.onsets[hottest] ?? null
      const between = Math.max(0, Math.ceil(leaves) - 1 - Math.floor(begins))
      count('studies')
      if (onset !== null) {
        count('begun')
        count('pulls between', Math.max(0, Math.floor(leaves) - onset))
      }
      if (between === 0) return
      count('with a pull between')
      if (onset !== null && (out === 0 || onset < out)) count('begun before out')
    },
  }
}

/** When separation began, told afterwards from the whole curve. */
export function onsetTime(
  name: string,
  method: Method,
  weeks: number,
  rates: [number, number],
  studies: number,
): Figure {
  const detection = method.detectionLimit!
  return {
    name,
    studies,
    study: (chance, count) => {
      const course: Course = {
        lag: chance.between(2, 16),
        rate: chance.between(...rates),
        plateau: chance.happens(0.5) ? chance.between(8, 20) : null,
      }
      const truth = passes(course, detection)!
      const run = runStudy({
        chance,
        method,
        weeks,
        truth: (station, week) => (station === hottest ? percentAt(course, week) : 0),
      })
      const points = run.walks[hottest]!.counted
      const { onset } = separationCurve({
        t: points.map((point) => point.time),
        percent: points.map((point) => point.mean),
        detectPercent: detection,
      })
      count('studies')
      if (onset !== null && Math.abs(onset - truth) <= 1) count('within a week')
    },
  }
}
