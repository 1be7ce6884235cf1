import { JarRow } from '@/components/bench/jar-row'
import { LargeCaution, useCaution } from '@/components/bench/station-caution'
import { TinyJar } from '@/components/bench/tiny-jar'
import { heatLine } from '@/components/marks/heat'
import { CycleAlarm, StationActs } from '@/components/station/station-acts'
import { StationLabel } from '@/components/ui/station-label'
import type { BenchStation } from '@/lib/bench/queries/today'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital } from '@/lib/study/rules/words'
import { periodText } from '@/lib/station/rules/downtime'

type StationProps = {
  station: BenchStation
  isOpen: boolean
  kept: Set<string>
  onPick: () => void
  onOpen: (code: string) => void
  now: number
  day: string
  zone: string
  mayLogTemperature: boolean
}

/** One place of the walk: its jars on its line, and unfolded each with what is asked of it. */
export function WalkStation({
  station,
  isOpen,
  kept,
  onPick,
  onOpen,
  now,
  day,
  zone,
  mayLogTemperature,
}: StationProps) {
  const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
  const line = heatLine(celsius ?? station.cycleLowC ?? -10)
  const open = station.jars.filter((j) => j.state === 'due' || j.state === 'resting')
  const leaning = station.jars.filter(
    (j) => j.state === 'done' && (j.standing === 'leaning' || j.standing === 'out'),
  )
  return (
    <li className={isOpen ? 'bg-recess pb-3' : ''}>
      <button
        type="button"
        onClick={onPick}
        aria-expanded={isOpen}
        className="flex min-h-16 w-full items-end gap-3 px-4 pt-3 text-left sm:px-5"
      >
        <span
          className="flex w-full items-end gap-3 pb-0"
          style={{
            borderBottom: `${line}px ${station.kind === 'freeze-thaw' ? 'dashed' : 'solid'} var(--ink)`,
          }}
        >
          <span className="w-[84px] shrink-0 pb-1 sm:w-[96px]">
            <StationLabel celsius={celsius} name="freeze thaw" size={isOpen ? 50 : 36} />
          </span>
          <span className="flex min-w-0 flex-1 flex-wrap items-end gap-x-1 gap-y-1 sm:gap-x-2">
            {inOrder(station.jars)
              .slice(0, 24)
              .map((jar) => (
                <span
                  key={jar.pullJarId}
                  className={kept.has(jar.pullJarId) ? 'border-x-2 border-b-2 border-ink px-0.5' : ''}
                >
                  <TinyJar
                    standing={jar.standing}
                    layers={jar.layers}
                    state={kept.has(jar.pullJarId) ? 'done' : jar.state}
                    height={isOpen ? 44 : 34}
                  />
                </span>
              ))}
            {station.jars.length > 24 ? (
              <span className="pb-1 text-17">and {station.jars.length - 24}</span>
            ) : null}
          </span>
          <span
            className={`shrink-0 pb-1 text-right text-17 ${leaning.length > 0 ? 'font-650 text-alarm' : 'text-soft'}`}
          >
            {/* Two ovens may keep the same temperature; open, the name stands below. */}
            {isOpen ? null : <span className="block font-430 text-soft">{station.name}</span>}
            {station.kind === 'freeze-thaw' ? <CycleAlarm stationId={station.id} /> : null}
            {remark(station, open.length, leaning.length)}
          </span>
        </span>
      </button>
      {isOpen ? (
        <div className="px-4 sm:px-5">
          <StationCaution station={station} day={day} />
          {station.downtime ? (
            <p className="pb-2 text-17">
              Out of use {periodText(station.downtime)}: {station.downtime.reason}
            </p>
          ) : null}
          <StationActs station={station} mayLogTemperature={mayLogTemperature} />
          <ul className="flex flex-col gap-3">
            {[...open, ...station.jars.filter((j) => !open.includes(j))].map((jar) => (
              <JarRow
                key={jar.pullJarId}
                jar={jar}
                isKept={kept.has(jar.pullJarId)}
                onOpen={onOpen}
                now={now}
                zone={zone}
              />
            ))}
          </ul>
        </div>
      ) : null}
    </li>
  )
}

function StationCaution({ station: { id, name, caution }, day }: Pick<StationProps, 'station' | 'day'>) {
  const { isNew, noteRead } = useCaution({ stationId: id, day, caution })
  return (
    <>
      <p className="py-2 text-17">
        {capital(name)}. {caution && !isNew ? <b>{caution}</b> : null}
      </p>
      {isNew ? (
        <div className="mb-3">
          <LargeCaution caution={caution} onRead={noteRead} />
        </div>
      ) : null}
    </>
  )
}

/** What is read stands first, as it fills along the shelf; what is to come is dotted behind it. */
function inOrder(jars: BenchStation['jars']): BenchStation['jars'] {
  const rank = { done: 0, missed: 1, resting: 2, due: 3 }
  return jars.toSorted((a, b) => rank[a.state] - rank[b.state])
}

function remark(station: BenchStation, open: number, leaning: number): string {
  if (station.jars.length === 0) return station.next ? spokenDay(station.next.dueOn) : 'nothing planned'
  if (open > 0) return `${open} to read`
  if (leaning > 0) return `${leaning} ${leaning === 1 ? 'leans' : 'lean'}`
  return 'all read'
}
