import { mkt } from '@/lib/science/mkt'
import { excursionSpans, hoursOfEntries, type TemperatureLimits } from '@/lib/science/temperature-log'
import type { TemperatureRecord } from '@/lib/shelf-case/rules/content'

type Station = TemperatureLimits & { name: string }
type Temperatures = { measuredAt: string; temperatureC: number }[]

const hourMs = 3600 * 1000

/** Mean kinetic temperature and excursions of a station's log; it never excuses one for an emulsion [practice]. */
export function temperatureRecord(
  { name, lowC, highC }: Station,
  entries: Temperatures,
): TemperatureRecord | null {
  const [first] = entries
  if (!first || entries.length < 2) return null
  const firstAt = first.measuredAt
  const hours = entries.map((entry) => (Date.parse(entry.measuredAt) - Date.parse(firstAt)) / hourMs)
  const hoursEach = hoursOfEntries(hours)
  const input = {
    temperaturesC: entries.map((entry) => entry.temperatureC),
    ...(hoursEach ? { hoursEach } : {}),
  }
  const log = { firstAt, hours, limits: { lowC, highC } }
  return {
    station: name,
    calc: { topic: 'mkt', input, output: mkt(input) },
    log,
    excursions: excursionsOf(log, input.temperaturesC),
  }
}

export function excursionsOf(
  { firstAt, hours, limits }: NonNullable<TemperatureRecord['log']>,
  temperaturesC: number[],
): TemperatureRecord['excursions'] {
  const at = (i: number) => new Date(Date.parse(firstAt) + (hours[i] ?? 0) * hourMs).toISOString()
  return excursionSpans(hours, temperaturesC, limits).map((span) => ({
    from: at(span.from),
    to: at(span.to),
    hours: span.hours,
    worstC: span.extremeC,
  }))
}
