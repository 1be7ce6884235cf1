import { isSamePlace } from '@/lib/protocol/rules/faults'
import type { PlannedStation } from '@/lib/protocol/schema'

export type StationOffer = {
  id: string
  name: string
  kind: string
  temperatureC: number | null
  isActive: boolean
  shelves: number
  placesPerShelf: number
  takenPlaces: number
  cycleLowC?: number | null
  cycleHighC?: number | null
}

/** The lab's stations that a planned one could use: same kind, same temperature, in use. */
export function fittingStations<T extends StationOffer>(planned: PlannedStation, stations: T[]): T[] {
  return stations.filter(
    (station) =>
      station.isActive &&
      station.kind === planned.kind &&
      (planned.kind !== 'temperature' || station.temperatureC === planned.temperatureC),
  )
}

/** Chosen where the person chose, otherwise the fitting one with the most room that is not yet taken by another. */
export function chosenStations<T extends StationOffer>(
  planned: PlannedStation[],
  stations: T[],
  choices: { position: number; stationId: string }[],
): (T | null)[] {
  const chosen = planned.map((_, position) => {
    const choice = choices.find((c) => c.position === position)
    return choice ? (stations.find((station) => station.id === choice.stationId) ?? null) : undefined
  })
  const found: (T | null)[] = chosen.map((choice) => choice ?? null)
  chosen.forEach((choice, position) => {
    const wanted = planned[position]!
    // A temperature does not tell which station has the lamps, so a person says it.
    if (choice !== undefined || wanted.light) return
    const isUsed = ({ id }: T) =>
      found.some((other, at) => other?.id === id && at !== position && isSamePlace(planned[at]!, wanted))
    found[position] =
      fittingStations(wanted, stations)
        .filter((station) => !isUsed(station))
        .toSorted((a, b) => freeIn(b) - freeIn(a))[0] ?? null
  })
  return found
}

export function freeIn(station: StationOffer): number {
  return station.shelves * station.placesPerShelf - station.takenPlaces
}
