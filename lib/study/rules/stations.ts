import { isSamePlace } from '@/lib/protocol/rules/faults'
import type { PlannedStation } from '@/lib/protocol/schema'
import { isLit } from '@/lib/station/rules/keeps'

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
  lightLux?: number | null
  lightUvWm2?: number | null
}

/** The lab's stations that a planned one could use: same kind, same temperature, lamps where it asks for light, in use. */
export function fittingStations<T extends StationOffer>(planned: PlannedStation, stations: T[]): T[] {
  return stations.filter(
    (station) =>
      station.isActive &&
      station.kind === planned.kind &&
      (planned.kind !== 'temperature' || station.temperatureC === planned.temperatureC) &&
      hasLamps(station) === asksForLamps(planned),
  )
}

export function hasLamps({ lightLux = null, lightUvWm2 = null }: StationOffer): boolean {
  return isLit({ lightLux, lightUvWm2 })
}

/** Jars in foil stand under the same lamps as those in light: only so do they have the same warmth. */
export function asksForLamps({ light }: PlannedStation): boolean {
  return light !== undefined
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
    if (choice !== undefined) return
    const isUsed = ({ id }: T) =>
      found.some((other, at) => other?.id === id && at !== position && isSamePlace(planned[at]!, wanted))
    found[position] = roomiest(fittingStations(wanted, stations).filter((station) => !isUsed(station)))
  })
  return found
}

/** The one with the most room; null where there is none. */
export function roomiest<T extends StationOffer>(stations: T[]): T | null {
  return stations.toSorted((a, b) => freeIn(b) - freeIn(a))[0] ?? null
}

export function freeIn(station: StationOffer): number {
  return station.shelves * station.placesPerShelf - station.takenPlaces
}
