export type Place = { shelf: number; place: number }

/** Free places of a station, shelf by shelf from the top, those in `taken` left out. */
export function freePlaces(
  station: { shelves: number; placesPerShelf: number },
  taken: { shelf: number | null; place: number | null }[],
  count: number,
): Place[] {
  const used = new Set(taken.map(({ shelf, place }) => `${shelf}/${place}`))
  const free: Place[] = []
  for (let shelf = 1; shelf <= station.shelves; shelf++) {
    for (let place = 1; place <= station.placesPerShelf && free.length < count; place++) {
      if (!used.has(`${shelf}/${place}`)) free.push({ shelf, place })
    }
  }
  return free
}

export function capacityOf({ shelves, placesPerShelf }: { shelves: number; placesPerShelf: number }): number {
  return shelves * placesPerShelf
}
