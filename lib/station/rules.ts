import { meanKineticTemperature } from '@/lib/science/mean-kinetic-temperature'

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
  if (log.length === 0)
    return { readings: 0, mktC: null, meanC: null, minC: null, maxC: null, excursions: [] }
  const times = log.map((entry) => Date.parse(entry.measuredAt) / 3_600_000)
  const mean = meanKineticTemperature(
    log.map((entry) => entry.temperatureC),
    spread(times) > 0 ? hoursOf(times) : undefined,
  )
  return { readings: log.length, ...mean, excursions: excursions(station, log) }
}

function spread(times: number[]): number {
  return times.at(-1)! - times[0]!
}

/** Hours each reading stands for: half the gap on either side. Readings of the same instant share it. */
function hoursOf(times: number[]): number[] {
  return times.map((time, index) => {
    const before = times[index - 1] ?? time
    const after = times[index + 1] ?? time
    return Math.max((after - before) / 2, 1e-6)
  })
}

function excursions(station: StationLimits, log: StationTemperature[]): Excursion[] {
  if (station.kind !== 'temperature') return []
  const found: Excursion[] = []
  let open: Excursion | null = null
  for (const { measuredAt, temperatureC } of log) {
    const side = sideOf(station, temperatureC)
    if (open && side !== open.side) {
      found.push(closed(open, measuredAt))
      open = null
    }
    if (!side) continue
    open ??= { from: measuredAt, to: measuredAt, extremeC: temperatureC, hours: 0, side }
    open.to = measuredAt
    open.extremeC =
      side === 'above' ? Math.max(open.extremeC, temperatureC) : Math.min(open.extremeC, temperatureC)
  }
  if (open) found.push(closed(open, open.to))
  return found
}

/** It ended at the latest when the first reading inside was taken. */
function closed(excursion: Excursion, to: string): Excursion {
  const hours = (Date.parse(to) - Date.parse(excursion.from)) / 3_600_000
  return { ...excursion, to, hours: Math.round(hours * 10) / 10 }
}

export function sideOf(
  limits: { lowC: number | null; highC: number | null },
  temperatureC: number,
): 'above' | 'below' | null {
  if (limits.highC !== null && temperatureC > limits.highC) return 'above'
  if (limits.lowC !== null && temperatureC < limits.lowC) return 'below'
  return null
}

/** Free places of a station, shelf by shelf from the top, those in `taken` left out. */
export function freePlaces(
  station: { shelves: number; placesPerShelf: number },
  taken: { shelf: number | null; place: number | null }[],
  count: number,
): { shelf: number; place: number }[] {
  const used = new Set(taken.map(({ shelf, place }) => `${shelf}/${place}`))
  const free: { shelf: number; place: number }[] = []
  for (let shelf = 1; shelf <= station.shelves; shelf++) {
    for (let place = 1; place <= station.placesPerShelf && free.length < count; place++) {
      if (!used.has(`${shelf}/${place}`)) free.push({ shelf, place })
    }
  }
  return free
}
