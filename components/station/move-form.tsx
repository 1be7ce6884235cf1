'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { StandingJar } from '@/lib/station/queries/places'
import type { StationRow } from '@/lib/station/queries/stations'
import { moveEffects, targetsFor, type SeriesPlace } from '@/lib/station/rules/moves'
import { capacityOf } from '@/lib/station/rules/places'
import { stationKeys } from '@/lib/station/keys'
import { degrees } from '@/lib/study/rules/finding'
import { counted } from '@/lib/study/rules/words'

export type Moved = { count: number; toName: string; studies: string[] }

type Props = {
  station: StationRow
  jars: StandingJar[]
  chosen: StandingJar[]
  studies: string[]
  seriesPlaces: SeriesPlace[]
  stations: StationRow[]
  onChoose: (ids: string[]) => void
  onClose: () => void
  onMoved: (moved: Moved) => void
}

/** Which jars go where and why, and what that means for each series before anything is moved. */
export function MoveForm(props: Props) {
  const { station, jars, chosen, studies, seriesPlaces, stations, onChoose, onClose, onMoved } = props
  const [id] = useState(newId)
  const [targetId, setTargetId] = useState('')
  const [reason, setReason] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const targets = targetsFor(
    chosen,
    station.id,
    stations.map((one) => ({ ...one, free: capacityOf(one) - one.takenPlaces })),
  )
  const target = targets.find((one) => one.station.id === targetId)
  const isShort = target !== undefined && !target.hasRoom
  const effects =
    target && chosen.length > 0 ? moveEffects(chosen, station, target.station, seriesPlaces) : []

  async function move() {
    if (!target) return
    setBusy(true)
    setError(null)
    try {
      const jarIds = chosen.map((jar) => jar.id)
      await send(stationKeys.moves(station.id), 'POST', { id, toStationId: targetId, jarIds, reason })
      const moved = [...new Set(chosen.map((jar) => jar.studyCode))].toSorted()
      onMoved({ count: chosen.length, toName: target.station.name, studies: moved })
    } catch (thrown) {
      setError(thrown)
      setBusy(false)
    }
  }

  return (
    <div className="mt-4 grid gap-4 border-t-[1.75px] border-ink pt-3">
      <div className="flex flex-wrap items-center gap-3">
        <p className="mr-2 text-17" aria-live="polite">
          <b>
            {chosen.length} of {counted(jars.length, 'jar')}
          </b>{' '}
          taken out
        </p>
        <Button onClick={() => onChoose(jars.map((jar) => jar.id))}>All {jars.length}</Button>
        {studies.length > 1
          ? studies.map((code) => (
              <Button
                key={code}
                onClick={() =>
                  onChoose([
                    ...new Set([
                      ...chosen.map((jar) => jar.id),
                      ...jars.filter((jar) => jar.studyCode === code).map((jar) => jar.id),
                    ]),
                  ])
                }
              >
                {code}
              </Button>
            ))
          : null}
        {chosen.length > 0 ? <Button onClick={() => onChoose([])}>Put all back</Button> : null}
      </div>
      <div className="flex flex-wrap items-start gap-3">
        <Select
          label="To"
          empty="Choose a station"
          value={targetId}
          onPick={setTargetId}
          error={fields['toStationId'] ?? (isShort ? shortOf(target, chosen.length) : undefined)}
          options={targets.map(({ station: one, keeps, hasRoom }) => ({
            value: one.id,
            label: `${one.name}${one.temperatureC === null ? '' : `, ${degrees(one.temperatureC)}`}, ${counted(one.free, 'place')} free${chosen.length === 0 ? '' : hasRoom ? (keeps ? ', as asked' : ', other conditions') : ', not enough'}`,
          }))}
          wrap="min-w-[260px] flex-1"
        />
        <Field
          label="Why"
          value={reason}
          onText={setReason}
          error={fields['reason']}
          placeholder="The fan of the oven failed."
          wrap="min-w-[260px] flex-[2]"
        />
      </div>
      {effects.length > 0 ? (
        <div>
          <h3 className="text-17 font-650">What it means</h3>
          <ul className="mt-1 divide-y divide-hair">
            {effects.map((effect) => (
              <li key={effect.studyStationId} className={`py-2 ${effect.isElsewhere ? 'font-600' : ''}`}>
                {effect.sentence}
              </li>
            ))}
          </ul>
        </div>
      ) : null}
      <ErrorNote error={error} />
      <div className="flex flex-wrap items-start gap-3">
        <Button
          kind="primary"
          busy={busy}
          why={whyNot(chosen.length, target, isShort, reason)}
          onClick={move}
        >
          Move {counted(chosen.length, 'jar')}
        </Button>
        <Button onClick={onClose}>Leave them here</Button>
      </div>
    </div>
  )
}

type Target = ReturnType<typeof targetsFor<StationRow & { free: number }>>[number]

function shortOf({ station: { name, free } }: Target, needed: number): string {
  return `${name} has ${counted(free, 'free place')}, ${needed} are needed. Move fewer there, or choose another.`
}

function whyNot(
  count: number,
  target: Target | undefined,
  isShort: boolean,
  reason: string,
): string | undefined {
  if (count === 0) return 'Take jars out.'
  if (!target) return 'Choose a station.'
  if (isShort) return 'Not enough places.'
  return reason.trim() === '' ? 'Say why.' : undefined
}
