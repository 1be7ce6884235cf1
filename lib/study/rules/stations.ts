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
  const used = new Set(chosen.flatMap((station) => (station ? [station.id] : [])))
  return chosen.map((choice, position) => {
    if (choice !== undefined) return choice
    const best = fittingStations(planned[position]!, stations)
      .filter((station) => !used.has(station.id))
      .toSorted((a, b) => freeIn(b) - freeIn(a))[0]
    if (best) used.add(best.id)
    return best ?? null
  })
}

export function freeIn(station: StationOffer): number {
  return station.shelves * station.placesPerShelf - station.takenPlaces
}
