import { meanKineticTemperature } from '@/lib/science/mean-kinetic-temperature'
import { excursionSpans, hoursOfEntries } from '@/lib/science/temperature-log'

export type StationLimits = {
  kind: string
  temperatureC: number | null
  lowC: number | null
  highC: number | null
}
export type StationTemperature = { measuredAt: string; temperatureC: number }
export type Excursion = { from: string; to: string; extremeC: number; hours: number; side: 'above' | 'below' }
export type StationRecord = {
  readings: number
  mktC: number | null
  meanC: number | null
  minC: number | null
  maxC: number | null
  excursions: Excursion[]
}

/**
 * A station's temperature record: mean kinetic temperature weighted by the hours each reading stands for (half
 * the way to its neighbours) and the stretches outside its limits. A cycling station has no limits and no
 * excursions here.
 */
export function recordOf(station: StationLimits, log: StationTemperature[]): StationRecord {
  const [first] = log
  if (!first) return { readings: 0, mktC: null, meanC: null, minC: null, maxC: null, excursions: [] }
  const hours = log.map((entry) => (Date.parse(entry.measuredAt) - Date.parse(first.measuredAt)) / 3_600_000)
  const temperatures = log.map((entry) => entry.temperatureC)
  const mean = meanKineticTemperature(temperatures, hoursOfEntries(hours))
  const spans = station.kind === 'temperature' ? excursionSpans(hours, temperatures, station) : []
  return {
    readings: log.length,
    ...mean,
    excursions: spans.map(({ from, to, side, extremeC, hours }) => ({
      from: log[from]!.measuredAt,
      to: log[to]!.measuredAt,
      extremeC,
      hours: Math.round(hours * 10) / 10,
      side,
    })),
  }
}
