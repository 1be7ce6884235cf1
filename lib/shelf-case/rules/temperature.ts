import { mkt } from '@/lib/science/mkt'
import type { TemperatureRecord } from '@/lib/shelf-case/rules/content'

type Station = { name: string; lowC: number | null; highC: number | null }
type Temperatures = { measuredAt: string; temperatureC: number }[]

const hourMs = 3600 * 1000

/**
 * Mean kinetic temperature and excursions of a station's log. Each entry stands until the next one (the last
 * for as long as the one before it); an excursion runs from its first entry outside the limits to the first
 * one back inside. It never excuses an excursion for an emulsion [practice].
 */
export function temperatureRecord(station: Station, log: Temperatures): TemperatureRecord | null {
  if (log.length < 2) return null
  const times = log.map((entry) => Date.parse(entry.measuredAt))
  const gaps = times.slice(1).map((t, i) => (t - (times[i] ?? t)) / hourMs)
  const hoursEach = [...gaps, gaps.at(-1) ?? 1].map((h) => (h > 0 ? h : 1 / 60))
  const input = { temperaturesC: log.map((entry) => entry.temperatureC), hoursEach }
  return {
    station: station.name,
    calc: { topic: 'mkt', input, output: mkt(input) },
    excursions: excursionsOf(station, log, hoursEach),
  }
}

function excursionsOf(
  station: Station,
  log: Temperatures,
  hoursEach: number[],
): TemperatureRecord['excursions'] {
  const found: TemperatureRecord['excursions'] = []
  let open: TemperatureRecord['excursions'][number] | null = null
  log.forEach((entry, i) => {
    const isHot = station.highC !== null && entry.temperatureC > station.highC
    const isCold = station.lowC !== null && entry.temperatureC < station.lowC
    if (!isHot && !isCold) {
      open = null
      return
    }
    if (open === null) {
      open = { from: entry.measuredAt, to: entry.measuredAt, hours: 0, worstC: entry.temperatureC }
      found.push(open)
    }
    open.hours += hoursEach[i] ?? 0
    open.to = new Date(Date.parse(entry.measuredAt) + (hoursEach[i] ?? 0) * hourMs).toISOString()
    if (isHot ? entry.temperatureC > open.worstC : entry.temperatureC < open.worstC)
      open.worstC = entry.temperatureC
  })
  return found
}
