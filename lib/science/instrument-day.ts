import { assertComputable, assertFinite, assertNumbers, assertPositive, assertSameLength } from './guard'
import { kelvin } from './kelvin'
import { mean, median } from './mean'
import { exceeds } from './rounding'
import { fitTrend, trendAt, type TrendPoint } from './trend'

export type InstrumentDayStation = { name: string; temperatureC: number; times: number[]; values: number[] }

export type InstrumentDayInput = {
  /** Series of one attribute read on one instrument; several batches at one station are several entries. */
  stations: InstrumentDayStation[]
  /** The day in question, on the same scale as `times`. */
  at: number
  repeatabilitySd: number
  /** Viscosity builds everywhere within 14 days of making: then a shift is only a note. */
  daysSinceMaking?: number
}

export type InstrumentDay = {
  shift: boolean
  level: 'doubt' | 'note' | null
  direction: 'high' | 'low' | null
  /** Median residual in repeatability SDs; null where fewer than three stations can be judged. */
  median: number | null
  evidence: {
    residuals: { name: string; temperatureC: number; residual: number }[]
    beyondOne: number
    coldestMean: number | null
  }
}

const leastStations = 3
const leastForLine = 6
const rule = { median: 2.25, each: 1, coldest: 1.75, buildingDays: 14 } as const

/**
 * Whether one instrument read high or low everywhere on one day: residuals from each station's own earlier line
 * (mean of its latest two while under six times), in s, counted in the direction of their median: median above 2.25
 * over at least three stations, at least three above 1, mean of the two coldest above 1.75. The cold stations keep a
 * real change of the hot ones from being taken for the instrument's.
 */
export function instrumentDay(input: InstrumentDayInput): InstrumentDay {
  assertFinite('at', input.at)
  assertPositive('repeatabilitySd', input.repeatabilitySd)
  const residuals = input.stations.flatMap((station, i) => {
    const residual = residualAt(station, input.at, `stations[${i}]`)
    return residual === null
      ? []
      : [
          {
            name: station.name,
            temperatureC: station.temperatureC,
            residual: inScatter(residual, input.repeatabilitySd, `stations[${i}]`),
          },
        ]
  })
  if (residuals.length < leastStations) {
    return {
      shift: false,
      level: null,
      direction: null,
      median: null,
      evidence: assertComputable('stations', { residuals, beyondOne: 0, coldestMean: null }),
    }
  }
  const middle = median(residuals.map((r) => r.residual))
  const sign = middle < 0 ? -1 : 1
  const beyondOne = residuals.filter((r) => exceeds(sign * r.residual, rule.each)).length
  const coldestMean = mean(
    [...residuals]
      .sort((a, b) => a.temperatureC - b.temperatureC)
      .slice(0, 2)
      .map((r) => r.residual),
  )
  const shift =
    exceeds(sign * middle, rule.median) &&
    beyondOne >= leastStations &&
    exceeds(sign * coldestMean, rule.coldest)
  const isBuilding = input.daysSinceMaking !== undefined && input.daysSinceMaking <= rule.buildingDays
  return assertComputable('stations', {
    shift,
    level: shift ? (isBuilding ? 'note' : 'doubt') : null,
    direction: shift ? (sign > 0 ? 'high' : 'low') : null,
    median: middle,
    evidence: { residuals, beyondOne, coldestMean },
  })
}

/** Distance of the day's mean from where the station's earlier readings lead; null where either is missing. */
function residualAt(station: InstrumentDayStation, at: number, field: string): number | null {
  const { times, values } = station
  kelvin(`${field}.temperatureC`, station.temperatureC)
  assertNumbers(`${field}.times`, times, 0)
  assertNumbers(`${field}.values`, values, 0)
  assertSameLength(`${field}.times`, times, `${field}.values`, values)
  const today: number[] = []
  const earlier: TrendPoint[] = []
  for (let i = 0; i < times.length; i++) {
    if (times[i] === at) today.push(values[i]!)
    else if (times[i]! < at) earlier.push({ time: times[i]!, mean: values[i]!, replicates: 1 })
  }
  if (today.length === 0 || earlier.length === 0) return null
  return mean(today) - expectedAt(earlier, at)
}

function inScatter(residual: number, repeatabilitySd: number, field: string): number {
  const share = residual / repeatabilitySd
  assertFinite(`${field}.values`, share)
  return share
}

function expectedAt(earlier: readonly TrendPoint[], at: number): number {
  const line = new Set(earlier.map((point) => point.time)).size < leastForLine ? null : fitTrend(earlier, 0)
  if (line !== null) return trendAt(line, at)
  const latest = earlier.toSorted((a, b) => a.time - b.time).slice(-2)
  return mean(latest.map((point) => point.mean))
}
