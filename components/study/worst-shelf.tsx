import { ShelfMini } from '@/components/charts/shelf-mini'
import { heatWeight } from '@/components/marks/heat'
import type { LedgerRow } from '@/lib/study/rules/ledger'
import { span } from './study-heading'

/** The worst shelf of a study between its station's name and how long it runs. */
export function WorstShelf({ row }: { row: LedgerRow }) {
  const { station } = row
  if (!station) return null
  return (
    <span className="flex items-center gap-2.5">
      <StationName station={station} />
      <ShelfMini
        temperatureC={station.temperatureC ?? 25}
        isFreezeThaw={station.kind === 'freeze-thaw'}
        endWeeks={
          station.kind === 'freeze-thaw' ? (station.cells.at(-1)?.weeks ?? row.endWeeks) : row.endWeeks
        }
        todayWeeks={row.elapsedWeeks}
        cells={station.cells.map((cell) => ({ ...cell, label: '' }))}
        title={`${stationText(station)}, ${row.standing}`}
      />
      <span className="text-13 whitespace-nowrap text-soft">
        {station.kind === 'freeze-thaw' ? `${station.cells.length - 1} cycles` : span(row.endWeeks)}
      </span>
    </span>
  )
}

type Station = NonNullable<LedgerRow['station']>

function StationName({ station }: { station: Station }) {
  if (station.kind !== 'temperature' || station.temperatureC === null) {
    return <span className="w-[44px] shrink-0 text-right">{stationText(station)}</span>
  }
  return (
    <span
      className="inline-flex w-[44px] shrink-0 items-start justify-end text-17 leading-none whitespace-nowrap"
      style={{ fontWeight: heatWeight(station.temperatureC) }}
    >
      {String(station.temperatureC).replace('-', '−')}
      <span className="text-[0.55em] leading-[1.3]">°C</span>
    </span>
  )
}

function stationText(station: Station): string {
  if (station.kind === 'transport') return 'road'
  if (station.kind === 'freeze-thaw' || station.temperatureC === null) return 'thaw'
  return `${station.temperatureC} °C`
}
