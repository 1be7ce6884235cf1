'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { ListPages } from '@/components/list/list-pages'
import { ListTools } from '@/components/list/list-tools'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { StationLabel } from '@/components/ui/station-label'
import { heatLine } from '@/components/marks/heat'
import type { ListQuery } from '@/lib/list/schema'
import type { StationRow, StationsPage } from '@/lib/station/queries/stations'
import { stationsFinding } from '@/lib/station/rules/finding'
import { lightText } from '@/lib/station/rules/keeps'
import { stationList } from '@/lib/station/rules/list'
import { sideOf } from '@/lib/science/temperature-log'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { StationDialog } from './station-dialog'
import { TemperatureDialog } from './temperature-dialog'

type Props = {
  /** All of them, for the headline. */
  stations: StationRow[]
  page: StationsPage
  query: ListQuery
  mayWrite: boolean
  mayLog: boolean
  timeZone: string
}

/** The lab's stations in the order of the walk, each a shelf as heavy as it is hot. */
export function StationList({ stations, page, query, mayWrite, mayLog, timeZone }: Props) {
  const router = useRouter()
  const [isAdding, setIsAdding] = useState(false)
  const [logged, setLogged] = useState<StationRow | null>(null)
  const finding = stationsFinding(stations)
  const add = mayWrite ? (
    <Button kind="primary" onClick={() => setIsAdding(true)}>
      Add a station
    </Button>
  ) : undefined
  return (
    <>
      <Heading
        crumb="Stations, in the order of the walk"
        headline={
          <>
            {finding.strong ? <b>{finding.strong}</b> : null}
            {finding.rest}
          </>
        }
        sentence={finding.sentence ?? undefined}
        acts={
          stations.length > 0 ? (
            <>
              {add}
              {stations.some((one) => one.isActive && one.kind === 'freeze-thaw') ? (
                <LinkButton href="/cycles">Freeze-thaw cycles</LinkButton>
              ) : null}
            </>
          ) : undefined
        }
      />
      {stations.length === 0 ? (
        <Empty
          title="Where jars will stand"
          sentence="An oven, a cabinet, a refrigerator: what each keeps, how many jars it holds, and what to mind there."
          act={add}
        />
      ) : (
        <>
          <div className="mt-4">
            <ListTools
              list={stationList}
              path="/stations"
              query={query}
              searchLabel="Find a station"
              placeholder="Name or caution"
              total={page.total}
              isDrawn
            />
          </div>
          {page.rows.length === 0 ? (
            <Empty
              title={query.q ? `No station has ${query.q}.` : 'No station is of that kind.'}
              act={<LinkButton href="/stations">Show all stations</LinkButton>}
            />
          ) : null}
          <ul className="mt-2">
            {page.rows.map((station) => (
              <li key={station.id} className={station.isActive ? '' : 'text-soft'}>
                <div className="flex flex-wrap items-end gap-x-6 gap-y-1 pt-5 pb-1.5">
                  <span className="w-[130px]">
                    <StationLabel
                      celsius={station.kind === 'temperature' ? station.temperatureC : null}
                      name={station.kind === 'transport' ? 'on road' : undefined}
                      size={44}
                    />
                  </span>
                  <Link
                    href={`/stations/${station.id}`}
                    className="min-w-[180px] text-19 font-650 underline-offset-4 hover:underline"
                  >
                    {station.name}
                  </Link>
                  <LastRead station={station} timeZone={timeZone} />
                  <span className="min-w-[150px]">
                    {station.takenPlaces} of {station.shelves * station.placesPerShelf} places taken
                  </span>
                  {mayLog && station.isActive ? (
                    <Button
                      className="ml-auto"
                      aria-label={`Log the temperature of ${station.name}`}
                      onClick={() => setLogged(station)}
                    >
                      Log the temperature
                    </Button>
                  ) : null}
                </div>
                <hr
                  className="border-0"
                  style={{
                    borderTop:
                      station.temperatureC === null
                        ? '1.5px dashed var(--ink)'
                        : `${heatLine(station.temperatureC)}px solid var(--ink)`,
                  }}
                />
                <p className="pt-1 text-13 text-soft">
                  {[conditionsText(station), station.caution, station.isActive ? '' : 'out of use']
                    .filter(Boolean)
                    .join('. ')}
                </p>
              </li>
            ))}
          </ul>
          <ListPages list={stationList} path="/stations" query={query} page={page} />
        </>
      )}
      {isAdding ? (
        <StationDialog
          station={null}
          nextOrder={Math.max(0, ...stations.map((one) => one.walkOrder)) + 1}
          onClose={() => setIsAdding(false)}
          onDone={() => router.refresh()}
        />
      ) : null}
      {logged ? (
        <TemperatureDialog station={logged} onClose={() => setLogged(null)} onDone={() => router.refresh()} />
      ) : null}
    </>
  )
}

function LastRead({ station, timeZone }: { station: StationRow; timeZone: string }) {
  if (station.lastC === null || station.lastAt === null) {
    return <span className="min-w-[190px] text-soft">not read yet</span>
  }
  const side = sideOf(station, station.lastC)
  return (
    <span className={`min-w-[190px] ${side ? 'font-700 text-alarm' : ''}`}>
      {station.lastC.toFixed(1).replace('-', '−')} °C on {spokenDay(dayIn(timeZone, station.lastAt), false)}
      {side ? `, ${side} its limits` : ''}
    </span>
  )
}

export function conditionsText(station: {
  kind: string
  lowC: number | null
  highC: number | null
  humidityPercent: number | null
  cycleLowC: number | null
  cycleHighC: number | null
  lightLux: number | null
  lightUvWm2: number | null
  lightHours: number | null
}): string {
  const light = lightText(station)
  return [
    limitsText(station),
    station.humidityPercent === null ? null : `${station.humidityPercent} % humidity`,
    light === null ? null : `lamps: ${light}`,
  ]
    .filter((part) => part !== null)
    .join(', ')
}

function limitsText(station: {
  kind: string
  lowC: number | null
  highC: number | null
  cycleLowC: number | null
  cycleHighC: number | null
}): string {
  const shown = (value: number) => String(value).replace('-', '−')
  if (station.kind === 'freeze-thaw' && station.cycleLowC !== null && station.cycleHighC !== null) {
    return `Cycles from ${shown(station.cycleLowC)} to ${shown(station.cycleHighC)} °C`
  }
  return station.lowC !== null && station.highC !== null
    ? `${shown(station.lowC)} to ${shown(station.highC)} °C`
    : station.highC !== null
      ? `at most ${shown(station.highC)} °C`
      : station.lowC !== null
        ? `at least ${shown(station.lowC)} °C`
        : 'No limits'
}
