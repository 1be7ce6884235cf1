'use client'

import { OccupancyPlot } from '@/components/station/occupancy-plot'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { StationLabel } from '@/components/ui/station-label'
import { downtimeText } from '@/lib/station/rules/downtime'
import { capacityOf } from '@/lib/station/rules/places'
import { addDays } from '@/lib/study/rules/calendar'
import type { RoomOption } from '@/lib/study/rules/room'
import { freeIn } from '@/lib/study/rules/stations'
import { capital, counted, listed } from '@/lib/study/rules/words'
import { placesOf, type Draft, type Offer, type StartPlace } from './start-state'

type Props = {
  offer: Offer
  draft: Draft
  /** How long the study runs. */
  endWeeks: number
  set: (change: Partial<Draft>) => void
  fields: Record<string, string>
}

/** Which of the lab's stations keeps what the protocol asks for, its places before and with this study, and what starts. */
export function StationChoices({ offer, draft, endWeeks, set, fields }: Props) {
  const places = placesOf(offer, draft)
  const leftOut = places.filter((place) => !place.isStarted)
  const until = addDays(offer.lab.today, Math.round(endWeeks * 7) + 14)
  return (
    <Section title="Where" sentence="Places from today on; the strong line is with this study.">
      <ul className="divide-y divide-hair">
        {places.map((place) => (
          <Place key={place.protocolPosition} {...{ place, draft, set, until }} />
        ))}
      </ul>
      {leftOut.length > 0 ? (
        <div className="mt-3 grid gap-2">
          <p>
            {capital(listed(leftOut.map((place) => place.name)))} will stand on the study’s record as planned
            and not started. What {leftOut.length === 1 ? 'it' : 'they'} would have shown, no case can claim.
          </p>
          <Field
            label="Why it starts in part"
            value={draft.whyInPart}
            onText={(whyInPart) => set({ whyInPart })}
            error={fields['whyInPart']}
          />
        </div>
      ) : null}
    </Section>
  )
}

function Place({
  place,
  draft,
  set,
  until,
}: {
  place: StartPlace
  draft: Draft
  set: (change: Partial<Draft>) => void
  until: string
}) {
  const { planned, name, protocolPosition, station, isStarted, isFull, needed, fitting } = place
  const leaveOut = draft.adjustments.leaveOutStations ?? []
  const start = (isOn: boolean) =>
    set({
      adjustments: {
        ...draft.adjustments,
        leaveOutStations: isOn
          ? leaveOut.filter((one) => one !== protocolPosition)
          : [...leaveOut, protocolPosition],
      },
    })
  return (
    <li className="grid grid-cols-[86px_1fr] items-start gap-x-4 gap-y-1 py-3">
      <div className={isStarted ? '' : 'text-soft'}>
        <StationLabel
          celsius={planned.kind === 'temperature' ? planned.temperatureC : null}
          name={planned.kind === 'transport' ? 'on road' : undefined}
          size={30}
        />
      </div>
      <div className="grid min-w-0 gap-1.5">
        <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
          <Checkbox
            label={<span className="sr-only">Start at {name} now</span>}
            checked={isStarted}
            onChange={(event) => start(event.target.checked)}
          />
          {!isStarted ? (
            <p className="text-15 text-soft">not started now, {planned.voice} in the protocol</p>
          ) : fitting.length === 0 ? (
            <p className="text-15 text-alarm">
              No station of the lab can be {name}. Ask a manager to add one, or start without it.
            </p>
          ) : (
            <Select
              label={`Station for ${name}`}
              hideLabel
              value={station?.id ?? ''}
              options={fitting.map((one) => ({
                value: one.id,
                label: `${one.name}, ${freeIn(one)} free`,
              }))}
              onPick={(stationId) =>
                set({ stationIds: { ...draft.stationIds, [protocolPosition]: stationId } })
              }
              wrap="min-w-[200px] flex-1"
            />
          )}
          {isStarted ? (
            <p className={`text-14 ${isFull ? 'text-alarm' : 'text-soft'}`}>
              {isFull
                ? `${counted(freeIn(station!), 'place')} free, ${needed} needed`
                : `${counted(needed, 'place')} needed`}
              , {planned.voice}
            </p>
          ) : null}
        </div>
        {station ? (
          <OccupancyPlot
            capacity={capacityOf(station)}
            steps={place.before}
            withStudy={place.after}
            height={72}
            until={until}
          />
        ) : null}
        {place.downtimes.map((down) => (
          <p key={down.fromOn} className="text-15">
            Out of use {downtimeText(down)}: {listed(down.pulls)} {down.pulls.length === 1 ? 'falls' : 'fall'}{' '}
            in.
          </p>
        ))}
        {place.options.length > 0 ? (
          <Ways options={place.options} draft={draft} set={set} protocolPosition={protocolPosition} />
        ) : null}
      </div>
    </li>
  )
}

function Ways({
  options,
  draft,
  set,
  protocolPosition,
}: {
  options: RoomOption[]
  draft: Draft
  set: (change: Partial<Draft>) => void
  protocolPosition: number
}) {
  const take = ({ stationId, adjustments, batches }: RoomOption) =>
    set({
      ...(stationId ? { stationIds: { ...draft.stationIds, [protocolPosition]: stationId } } : {}),
      ...(adjustments ? { adjustments } : {}),
      ...(batches ? { batchIds: draft.batchIds.slice(0, batches) } : {}),
    })
  return (
    <div>
      <h3 className="text-15 font-650">What would make it fit</h3>
      <ul className="mt-1 flex flex-wrap gap-2">
        {options.map((option) => (
          <li key={`${option.kind} ${option.label}`}>
            {option.kind === 'day' ? (
              <p className="py-1.5 text-15">{option.label}.</p>
            ) : (
              <Button onClick={() => take(option)}>{option.label}</Button>
            )}
          </li>
        ))}
      </ul>
    </div>
  )
}
