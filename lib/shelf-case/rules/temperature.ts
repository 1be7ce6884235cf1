import { mkt } from '@/lib/science/mkt'
import { excursionSpans, hoursOfEntries } from '@/lib/science/temperature-log'
import type { TemperatureRecord } from '@/lib/shelf-case/rules/content'
import type { Stay } from '@/lib/shelf-case/queries/evidence'

const hourMs = 3600 * 1000

/**
 * Mean kinetic temperature and excursions of what the jars had, from one station to the next where they were moved;
 * it never excuses an excursion for an emulsion [practice].
 */
export function temperatureRecord(stays: Stay[]): TemperatureRecord | null {
  const entries = stays.flatMap((stay) => stay.entries)
  const [first] = entries
  const [begun] = stays
  if (!first || !begun || entries.length < 2) return null
  const firstAt = first.measuredAt
  const hours = entries.map((entry) => (Date.parse(entry.measuredAt) - Date.parse(firstAt)) / hourMs)
  const hoursEach = hoursOfEntries(hours)
  const input = {
    temperaturesC: entries.map((entry) => entry.temperatureC),
    ...(hoursEach ? { hoursEach } : {}),
  }
  const log = { firstAt, hours, limits: limitsOf(begun) }
  const told = stays.map((stay) => ({
    station: stay.name,
    fromAt: stay.fromAt,
    entries: stay.entries.length,
    limits: limitsOf(stay),
  }))
  const record = {
    station: stays.map((stay) => stay.name).join(', then '),
    calc: { topic: 'mkt' as const, input, output: mkt(input) },
    log,
    ...(stays.length > 1 ? { stays: told } : {}),
  }
  return { ...record, excursions: excursionsOf(record) }
}

function limitsOf({ lowC, highC }: Stay) {
  return { lowC, highC }
}

/** Each stay by its own station's limits; a stretch outside never reaches from one station into the next. */
export function excursionsOf({
  calc,
  log,
  stays,
}: Pick<TemperatureRecord, 'calc' | 'log' | 'stays'>): TemperatureRecord['excursions'] {
  if (!log) return []
  const { temperaturesC } = calc.input
  const { firstAt, hours } = log
  const parts = stays ?? [{ entries: hours.length, limits: log.limits }]
  let begin = 0
  return parts.flatMap(({ entries, limits }) => {
    const offset = begin
    begin += entries
    const own = hours.slice(offset, begin)
    const at = (i: number) => new Date(Date.parse(firstAt) + (own[i] ?? 0) * hourMs).toISOString()
    return excursionSpans(own, temperaturesC.slice(offset, begin), limits).map((span) => ({
      from: at(span.from),
      to: at(span.to),
      hours: span.hours,
      worstC: span.extremeC,
    }))
  })
}
