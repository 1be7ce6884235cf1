'use client'

import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { StationLabel } from '@/components/ui/station-label'
import { jarsAtStation, stationName } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { fittingStations, freeIn } from '@/lib/study/rules/stations'
import { counted } from '@/lib/study/rules/words'
import { stationsOf, type Draft, type Offer } from './start-state'

type Props = { offer: Offer; draft: Draft; plan: ProtocolPlan; set: (change: Partial<Draft>) => void }

/** Which of the lab's stations keeps what the protocol asks for, with the places it has and needs. */
export function StationChoices({ offer, draft, plan, set }: Props) {
  const chosen = stationsOf(offer, draft, plan)
  return (
    <Section title="Where">
      <ul className="divide-y divide-hair">
        {plan.stations.map((planned, position) => {
          const name = stationName(planned, position)
          const station = chosen[position]
          const fitting = fittingStations(planned, offer.stations)
          const needed = jarsAtStation(plan, planned) * Math.max(1, draft.batchIds.length)
          const isFull = station ? freeIn(station) < needed : false
          return (
            <li
              key={position}
              className="grid grid-cols-[86px_1fr] items-center gap-x-4 gap-y-1 py-2.5 sm:grid-cols-[86px_1fr_190px]"
            >
              <StationLabel
                celsius={planned.kind === 'temperature' ? planned.temperatureC : null}
                name={planned.kind === 'transport' ? 'on road' : undefined}
                size={30}
              />
              {fitting.length === 0 ? (
                <p className="text-15 text-alarm">
                  No station of the lab can be {name}. Ask a manager to add one.
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
                  onPick={(stationId) => set({ stationIds: { ...draft.stationIds, [position]: stationId } })}
                />
              )}
              <p className={`col-start-2 text-14 sm:col-start-auto ${isFull ? 'text-alarm' : 'text-soft'}`}>
                {isFull
                  ? `${freeIn(station!)} places, ${needed} needed`
                  : `${counted(needed, 'place')} needed`}
                , {planned.voice}
              </p>
            </li>
          )
        })}
      </ul>
    </Section>
  )
}
