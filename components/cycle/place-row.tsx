'use client'

import Link from 'next/link'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { StationLabel } from '@/components/ui/station-label'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { capital, counted, numberWord } from '@/lib/study/rules/words'
import { CycleWave } from './cycle-wave'
import type { Person } from '@/lib/cycle/rules/changing'
import { whenText } from '@/lib/cycle/rules/half-words'
import { runningText, stateOf } from './cycle-words'
import { EndDialog } from './end-dialog'
import { HalfList } from './half-list'
import { HalvesToggle, useHalves } from './halves-toggle'
import { PaperDialog } from './paper-dialog'
import { PressDialog } from './press-dialog'
import type { usePress } from './use-press'

type Props = {
  place: CyclePlace
  now: string
  zone: string
  /** Null for whoever only reads. */
  person: Person | null
  presses: ReturnType<typeof usePress>
}
type Asked = 'paper' | 'begin' | 'hold' | 'go on' | 'end' | null

/** One study at its freezer, on a dashed line: how far the cycles are, what runs, and the one next press. */
export function PlaceRow({ place, now, zone, person, presses }: Props) {
  const [asked, setAsked] = useState<Asked>(null)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const state = stateOf(place, now)
  const halves = useHalves(place)
  const kept = presses.keptAt(place.id)
  const half = state.kind === 'over' ? null : { cycle: state.cycle, half: state.half }
  const name = half && `${half.half} half of cycle ${half.cycle}`
  const close = () => setAsked(null)

  async function begin() {
    if (!half) return
    setBusy(true)
    setError(null)
    try {
      await presses.press(place, half, 'begin')
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <li data-density="bench" className="pb-6">
      <div className="flex flex-wrap items-end gap-x-5 gap-y-1 border-b-2 border-dashed border-ink pb-1.5">
        <StationLabel celsius={null} size={50} />
        <h2 className="min-w-[220px] flex-1 text-20 leading-tight">
          <Link
            href={`/studies/${place.studyCode}`}
            className="-my-[19px] inline-block py-[19px] font-mono font-650 underline underline-offset-4"
          >
            {place.studyCode}
          </Link>{' '}
          <b>{place.studyTitle}</b>
          <span className="block text-17 text-soft">
            {place.stationName}, {counted(place.jarsInCycle, 'jar')} in cycle
          </span>
        </h2>
        <HalvesToggle {...halves} code={place.studyCode} />
      </div>
      <div className="mt-3">
        <CycleWave place={place} state={state} />
      </div>
      <div className="mt-2 flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
        <p className="min-w-[240px] flex-1 text-18">
          {state.kind === 'over' ? (
            <b>All {place.cycles} cycles are over.</b>
          ) : state.kind === 'waiting' ? (
            <>
              <b>Next: the {name}.</b>
              {state.since ? ` The half before it ended ${whenText(state.since, now, zone)}.` : ''}
            </>
          ) : (
            <>
              <b className={state.isOverdue ? 'text-alarm' : ''}>
                {state.isOverdue ? 'Overdue: the' : 'The'} {name}
              </b>
              , begun {whenText(state.begunAt, now, zone)} by {state.begunBy}.{' '}
              <span className={state.isOverdue ? 'font-650 text-alarm' : ''}>
                {runningText(state, now, zone)}
              </span>
            </>
          )}
          {kept.length > 0 ? (
            <span className="block font-650">
              {capital(counted(kept.length, 'entry', 'entries'))} kept on this device, not sent yet.
            </span>
          ) : null}
        </p>
        {person && half ? (
          <div className="flex flex-wrap gap-3">
            {state.kind === 'waiting' ? (
              <>
                <Button density="bench" onClick={() => setAsked('paper')}>
                  From paper
                </Button>
                <Button density="bench" onClick={() => setAsked('begin')}>
                  Begun earlier
                </Button>
                <Button density="bench" kind="primary" busy={isBusy} onClick={begin}>
                  Begin the {half.half} half
                </Button>
              </>
            ) : null}
            {state.kind === 'running' ? (
              <>
                <Button density="bench" onClick={() => setAsked(state.hold ? 'go on' : 'hold')}>
                  {state.hold ? 'Go on' : 'Hold it'}
                </Button>
                <Button density="bench" kind="primary" onClick={() => setAsked('end')}>
                  End the {half.half} half
                </Button>
              </>
            ) : null}
          </div>
        ) : null}
      </div>
      <ErrorNote error={error} />
      <Inspections place={place} />
      {halves.isOpen ? <HalfList id={halves.id} {...{ place, now, zone, person, presses }} /> : null}
      {asked === 'end' && state.kind === 'running' ? (
        <EndDialog
          place={place}
          state={state}
          now={now}
          zone={zone}
          onClose={close}
          onEnd={(ending) => presses.press(place, state, 'end', ending)}
        />
      ) : null}
      {asked === 'paper' && half ? (
        <PaperDialog {...{ place, half, now, zone, presses }} onClose={close} />
      ) : null}
      {asked !== null && asked !== 'end' && asked !== 'paper' && half ? (
        <PressDialog
          title={
            asked === 'begin'
              ? `When did the ${name} begin?`
              : asked === 'hold'
                ? `Hold the ${name}`
                : `The ${name} goes on`
          }
          act={asked === 'begin' ? 'Begin it' : asked === 'hold' ? 'Hold it' : 'Go on'}
          asksReason={asked === 'hold'}
          now={now}
          zone={zone}
          onClose={close}
          onPress={({ reason, ...given }) =>
            presses.press(place, half, asked, asked === 'begin' ? given : { ...given, reason })
          }
        />
      ) : null}
    </li>
  )
}

/** Of the jars to look at, so many stand here; all do on the Bench. */
const shown = 12

/** After a cycle its jars are looked at: the pull's own jars, one press away. */
function Inspections({ place }: { place: CyclePlace }) {
  const open = place.inspections.filter((jar) => jar.isToRead)
  if (open.length === 0) return null
  return (
    <div className="mt-3 flex flex-wrap items-center gap-3 text-18">
      <span>
        <b>{capital(counted(open.length, 'jar'))} to look at</b> after {open[0]!.label}:
      </span>
      {open.slice(0, shown).map((jar) => (
        <Link
          key={jar.code}
          href={`/bench/${jar.code}`}
          className="grid min-h-16 min-w-16 place-items-center rounded border-2 border-rule bg-paper px-4 font-mono text-20 font-650"
        >
          {jar.code}
        </Link>
      ))}
      {open.length > shown ? (
        <Link href="/bench" className="flex min-h-16 items-center underline underline-offset-4">
          and {numberWord(open.length - shown)} more on the Bench
        </Link>
      ) : null}
    </div>
  )
}
