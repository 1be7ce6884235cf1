'use client'

import Link from 'next/link'
import useSWR from 'swr'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import type { CycleBoard as Board, CyclePlace } from '@/lib/cycle/queries/board'
import { cycleKeys } from '@/lib/cycle/keys'
import type { Person } from '@/lib/cycle/rules/changing'
import { Section } from '@/components/ui/section'
import { fetcher } from '@/lib/http/fetcher'
import { capital, numberWord } from '@/lib/study/rules/words'
import { stateOf } from './cycle-words'
import { HalfList, type HalfListProps } from './half-list'
import { HalvesToggle, useHalves } from './halves-toggle'
import { PlaceRow } from './place-row'
import { usePress } from './use-press'
import { useServerClock } from './use-server-clock'

/** Jars in cycle, by study and freezer; its clock is the server's and goes on between two answers. */
export function CycleBoard({ person }: { person: Person | null }) {
  const { data: board, mutate } = useSWR<Board>(cycleKeys.board, fetcher, { refreshInterval: 30_000 })
  const presses = usePress(() => void mutate())
  const now = useServerClock(board?.now)
  if (!board || !now) return null
  const places = board.places
    .map((place) => presses.withKept(place, now))
    .map((place) => ({ place, state: stateOf(place, now) }))
    .toSorted((a, b) => rank(a.state) - rank(b.state))
  const isThrough = ({ place, state }: (typeof places)[number]) =>
    state.kind === 'over' && !place.inspections.some((jar) => jar.isToRead)
  const over = places.filter(isThrough)
  return (
    <div className="mx-auto max-w-[900px]">
      <Heading
        crumb={
          <>
            <Link href="/bench">Bench</Link>, <Link href="/stations">stations</Link>, freeze-thaw
          </>
        }
        headline={<Headline states={places.map(({ state }) => state)} />}
      />
      {places.length === 0 ? (
        <Empty
          title="Freeze-thaw stations of running studies will stand here"
          sentence="Each with its cycles, what runs and until when: they begin with a study whose protocol has a freeze-thaw station."
          act={
            <Link href="/studies" className="text-17 underline underline-offset-4">
              To the studies
            </Link>
          }
        />
      ) : (
        <ul className="mt-6">
          {places
            .filter((one) => !isThrough(one))
            .map(({ place }) => (
              <PlaceRow
                key={place.id}
                place={place}
                now={now}
                zone={board.zone}
                person={person}
                presses={presses}
              />
            ))}
        </ul>
      )}
      {over.length > 0 ? (
        <Over places={over.map(({ place }) => place)} {...{ now, zone: board.zone, person, presses }} />
      ) : null}
    </div>
  )
}

type OverProps = Omit<HalfListProps, 'id' | 'place'>

/** What is through its cycles: one line each, and its halves where somebody asks for them. */
function Over({ places, ...rest }: { places: Board['places'] } & OverProps) {
  return (
    <Section title="Through their cycles" className="pb-6">
      <ul data-density="bench" className="text-17">
        {places.map((place) => (
          <OverRow key={place.id} place={place} {...rest} />
        ))}
      </ul>
    </Section>
  )
}

function OverRow({ place, ...rest }: { place: CyclePlace } & OverProps) {
  const halves = useHalves(place)
  return (
    <li className="flex min-h-16 flex-wrap items-center justify-between gap-x-6 border-b border-dashed border-hair">
      <span className="min-w-[240px] flex-1">
        <Link
          href={`/studies/${place.studyCode}`}
          className="-my-[21px] inline-block py-[21px] font-mono underline underline-offset-4"
        >
          {place.studyCode}
        </Link>{' '}
        {place.studyTitle}
        <span className="block text-soft">
          all {place.cycles} cycles, {place.stationName}
        </span>
      </span>
      <HalvesToggle {...halves} code={place.studyCode} />
      {halves.isOpen ? <HalfList id={halves.id} place={place} {...rest} /> : null}
    </li>
  )
}

type State = ReturnType<typeof stateOf>

function Headline({ states }: { states: State[] }) {
  const overdue = states.filter((state) => state.kind === 'running' && state.isOverdue).length
  const running = states.filter((state) => state.kind === 'running').length
  const waiting = states.filter((state) => state.kind === 'waiting').length
  if (overdue > 0) {
    return (
      <>
        <b className="text-alarm">
          {capital(numberWord(overdue))} {overdue === 1 ? 'half is' : 'halves are'} overdue
        </b>
        {running > overdue ? <>, {numberWord(running - overdue)} more in cycle</> : null}
      </>
    )
  }
  if (running > 0) {
    return (
      <>
        <b>
          {capital(numberWord(running))} {running === 1 ? 'half runs' : 'halves run'}
        </b>
        {waiting > 0 ? <>, {numberWord(waiting)} to begin</> : <> in time</>}
      </>
    )
  }
  if (waiting > 0) {
    return (
      <>
        <b>
          {capital(numberWord(waiting))} {waiting === 1 ? 'half' : 'halves'}
        </b>{' '}
        to begin
      </>
    )
  }
  return (
    <>
      <b>Nothing</b> is in cycle
    </>
  )
}

function rank(state: State): number {
  if (state.kind === 'running') return state.isOverdue ? 0 : state.isDue ? 1 : 2
  return state.kind === 'waiting' ? 3 : 4
}
