'use client'

import { Button } from '@/components/ui/button'
import { Select } from '@/components/ui/select'
import { stationName } from '@/lib/protocol/rules/plan'
import type { PlannedStation } from '@/lib/protocol/schema'
import type { PlanFault } from '@/lib/protocol/rules/faults'
import { NumberPart } from './number-part'
import { StationVariant } from './station-variant'

type Props = {
  stations: PlannedStation[]
  setStation: (index: number, change: Partial<PlannedStation>) => void
  setStations: (stations: PlannedStation[]) => void
  faults: PlanFault[]
  fields: Record<string, string>
}

const kinds = [
  { value: 'temperature', label: 'one temperature' },
  { value: 'freeze-thaw', label: 'freeze-thaw' },
  { value: 'transport', label: 'transport' },
]
const voices = [
  { value: 'decides', label: 'decides' },
  { value: 'informs', label: 'informs' },
  { value: 'supports', label: 'supports' },
]

const fresh: PlannedStation = {
  kind: 'temperature',
  temperatureC: 30,
  voice: 'informs',
  timePoints: [],
  windowDays: 1,
  watchJars: 1,
  measuringJarsPerPull: 1,
  spares: 1,
}

/** Each station of the plan: what it keeps, what its failures mean, and its jars. */
export function StationEditor({ stations, setStation, setStations, faults, fields }: Props) {
  return (
    <div className="mt-6">
      <ul className="divide-y divide-hair border-y border-hair">
        {stations.map((station, index) => {
          const name = stationName(station, index)
          return (
            <li key={index} className="flex flex-wrap items-end gap-3 py-3" role="group" aria-label={name}>
              <Select
                label="Keeps"
                value={station.kind}
                options={kinds}
                onPick={(kind) =>
                  setStation(index, {
                    kind: kind as PlannedStation['kind'],
                    temperatureC: kind === 'temperature' ? (station.temperatureC ?? 25) : null,
                    ...(kind === 'temperature' ? { cycle: undefined } : { light: undefined }),
                    ...(kind === 'transport' ? { cycle: undefined } : {}),
                  })
                }
                wrap="w-[170px]"
              />
              {station.kind === 'temperature' ? (
                <NumberPart
                  label="°C"
                  value={station.temperatureC ?? 25}
                  onNumber={(temperatureC) => setStation(index, { temperatureC })}
                  wrap="w-[80px]"
                />
              ) : null}
              <Select
                label="Voice"
                value={station.voice}
                options={voices}
                onPick={(voice) => setStation(index, { voice: voice as PlannedStation['voice'] })}
                wrap="w-[130px]"
              />
              <NumberPart
                label="Window, days"
                value={station.windowDays}
                onNumber={(windowDays) => setStation(index, { windowDays })}
              />
              <NumberPart
                label="Watch jars"
                value={station.watchJars}
                onNumber={(watchJars) => setStation(index, { watchJars })}
              />
              <NumberPart
                label="Measuring, a pull"
                value={station.measuringJarsPerPull}
                onNumber={(measuringJarsPerPull) => setStation(index, { measuringJarsPerPull })}
                wrap="w-[150px]"
              />
              <NumberPart
                label="Spares"
                value={station.spares}
                onNumber={(spares) => setStation(index, { spares })}
                wrap="w-[90px]"
              />
              <Button
                kind="danger"
                aria-label={`Take out ${name}`}
                onClick={() => setStations(stations.filter((_, at) => at !== index))}
              >
                Take out
              </Button>
              <StationVariant station={station} onChange={(change) => setStation(index, change)} />
              <Faults index={index} faults={faults} fields={fields} />
            </li>
          )
        })}
      </ul>
      <Button
        className="mt-3"
        why={stations.length >= 12 ? 'Twelve stations are the most.' : undefined}
        onClick={() => setStations([...stations, { ...fresh, timePoints: stations[0]?.timePoints ?? [] }])}
      >
        Add a station
      </Button>
    </div>
  )
}

/** What is wrong with this station, where it is: what is not kept stands out from what is only unfinished. */
function Faults({ index, faults, fields }: { index: number } & Pick<Props, 'faults' | 'fields'>) {
  const path = `plan.stations.${index}.`
  const own = faults.filter((fault) => fault.path.startsWith(path))
  // What the plan's own rules say is said live, so an answer to an earlier save would only be stale.
  const answered = Object.entries(fields).filter(
    ([field]) => field.startsWith(path) && !/\.(windowDays|leftOut)$/.test(field),
  )
  return (
    <>
      {own.map(({ sentence, keepsFrom }) => (
        <p key={sentence} className={`w-full text-14 ${keepsFrom === 'saving' ? 'text-alarm' : 'text-soft'}`}>
          {sentence}
        </p>
      ))}
      {answered.map(([field, sentence]) => (
        <p key={field} role="alert" className="w-full text-14 text-alarm">
          {sentence}
        </p>
      ))}
    </>
  )
}
