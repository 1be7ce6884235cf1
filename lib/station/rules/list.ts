import { choice, describeList } from '@/lib/list/schema'
import { sideOf } from '@/lib/science/temperature-log'
import type { StationRow } from '../queries/stations'

export const stationList = describeList<StationRow>()({
  name: 'stations',
  sort: 'walk',
  columns: [
    {
      key: 'walk',
      title: 'place in the walk',
      kind: 'number',
      sort: 'number',
      value: (row) => row.walkOrder,
    },
    { key: 'name', title: 'station', sort: 'text', value: (row) => row.name },
    { key: 'kind', title: 'kind', sort: 'text', value: (row) => row.kind },
    {
      key: 'temperature',
      title: 'set to, °C',
      kind: 'number',
      sort: 'number',
      value: (row) => row.temperatureC,
    },
    { key: 'low', title: 'at least, °C', kind: 'number', value: (row) => row.lowC },
    { key: 'high', title: 'at most, °C', kind: 'number', value: (row) => row.highC },
    { key: 'humidity', title: 'humidity, %', kind: 'number', value: (row) => row.humidityPercent },
    { key: 'last', title: 'last read, °C', kind: 'number', sort: 'number', value: (row) => row.lastC },
    { key: 'lastAt', title: 'read', kind: 'instant', sort: 'instant', value: (row) => row.lastAt },
    { key: 'side', title: 'limits', value: limitsOf },
    { key: 'taken', title: 'places taken', kind: 'number', value: (row) => row.takenPlaces },
    {
      key: 'places',
      title: 'places',
      kind: 'number',
      sort: 'number',
      value: (row) => row.shelves * row.placesPerShelf,
    },
    { key: 'caution', title: 'caution', value: (row) => row.caution },
    { key: 'use', title: 'in use', value: (row) => (row.isActive ? 'yes' : 'out of use') },
  ],
  filters: {
    kind: choice('Kind', ['temperature', 'freeze-thaw', 'transport']),
    use: choice('Use', ['in use', 'out of use']),
  },
})

function limitsOf(row: StationRow): string {
  if (row.lastC === null) return 'not read yet'
  const side = sideOf(row, row.lastC)
  return side ? `${side} its limits` : 'inside'
}
