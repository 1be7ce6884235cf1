'use client'

import { Suspense, useState } from 'react'
import { ByInstrument, FindJar } from '@/components/bench/later'
import { DayHead } from '@/components/bench/day-head'
import { HandOver } from '@/components/bench/hand-over'
import { HandoverNotes } from '@/components/bench/handover-notes'
import { settledHere } from '@/components/bench/kept-jars'
import { useCalledJar } from '@/components/bench/use-called-jar'
import { useLabelReader } from '@/components/bench/use-label-reader'
import { useNow } from '@/components/bench/use-now'
import { WalkStation } from '@/components/bench/walk-station'
import { WeekLoad } from '@/components/bench/week-load'
import type { BenchPerson } from '@/components/device/last-person'
import { useKept } from '@/components/device/use-kept'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import type { Bench } from '@/lib/bench/queries/today'

type Props = {
  bench: Bench
  person: BenchPerson
  outbox: OutboxOnScreen
  isReady: boolean
  /** By instrument: the jar that was called up. */
  called: string | null
  onCalled: (code: string | null) => void
  onOpen: (code: string) => void
  onChange: () => void
}

/** Today, in the order one walks the stations: jar by jar along the shelf, or one instrument after the other. */
export function BenchDay({ bench, person, outbox, isReady, called, onCalled, onOpen, onChange }: Props) {
  const first = bench.stations.find((s) => s.counts.due + s.counts.resting > 0)?.id ?? null
  const [picked, setPicked] = useState<string | null>(null)
  const [finding, setFinding] = useState<'scanning' | 'typing' | null>(null)
  const [walk, setWalk] = useKept<{ way: 'jar' | 'instrument' }>('walk', { way: 'jar' })
  const now = useNow(bench.now)
  const isByInstrument = walk.way === 'instrument' && person.mayLog
  const openJar = (code: string) => (isByInstrument ? onCalled(code) : onOpen(code))
  const jar = useCalledJar(bench, openJar)
  useLabelReader((text) => void jar.call(text))
  const openId = picked ?? first
  const kept = settledHere(bench, outbox.items)
  return (
    <div className="mx-auto flex min-h-[calc(100dvh-64px)] max-w-[820px] flex-col">
      <DayHead bench={bench} outbox={outbox} isReady={isReady} />
      <HandoverNotes notes={bench.notes} mayRead={person.mayLog} onChange={onChange} />
      {jar.error ? (
        <div
          role="alert"
          className="mx-4 mt-3 flex items-center gap-3 border-l-[5px] border-ink pl-3 sm:mx-5"
        >
          <p className="min-w-0 flex-1 text-20">{jar.error}</p>
          <Button density="bench" onClick={jar.forget}>
            Put away
          </Button>
        </div>
      ) : null}
      {person.mayLog && bench.counts.total > 0 ? (
        <div role="group" aria-label="How to go" className="mt-3 flex gap-3 px-4 sm:px-5">
          {(['jar', 'instrument'] as const).map((way) => (
            <button
              key={way}
              type="button"
              aria-pressed={walk.way === way}
              onClick={() => setWalk({ way })}
              className={`min-h-16 flex-1 text-20 ${walk.way === way ? 'border-b-[5px] border-ink font-700' : 'border-b-2 border-rule'}`}
            >
              {way === 'jar' ? 'Jar by jar' : 'By instrument'}
            </button>
          ))}
        </div>
      ) : null}
      {isByInstrument ? (
        <Suspense fallback={<p className="flex-1 p-5">The instruments are being looked up.</p>}>
          <ByInstrument {...{ bench, person, outbox, onOpen, onChange, called }} onCalled={onCalled} />
        </Suspense>
      ) : (
        <ol className="mt-3 flex-1">
          {bench.stations.map((station) => (
            <WalkStation
              key={station.id}
              station={station}
              isOpen={station.id === openId}
              kept={kept}
              onPick={() => setPicked(station.id)}
              onOpen={onOpen}
              now={now}
              day={bench.today}
              zone={bench.zone}
              mayLogTemperature={person.mayLogTemperature}
            />
          ))}
        </ol>
      )}
      <WeekLoad bench={bench} />
      {person.mayLog ? <HandOver bench={bench} now={now} onChange={onChange} /> : null}
      <div
        className={`mt-3 flex gap-3 bg-ground px-4 pb-3 pt-3 sm:px-5 ${isByInstrument ? '' : 'sticky bottom-0'}`}
      >
        <button
          type="button"
          data-kind="primary"
          className="btn min-w-0 flex-1 max-sm:px-3"
          onClick={() => setFinding('scanning')}
        >
          <ScanMark /> Scan a label
        </button>
        <button
          type="button"
          data-kind="secondary"
          className="btn max-sm:px-3"
          onClick={() => setFinding('typing')}
        >
          Type a code
        </button>
      </div>
      {finding ? (
        <Suspense fallback={null}>
          <FindJar
            bench={bench}
            isScanning={finding === 'scanning'}
            onOpen={(code) => {
              setFinding(null)
              openJar(code)
            }}
            onClose={() => setFinding(null)}
          />
        </Suspense>
      ) : null}
    </div>
  )
}

function ScanMark() {
  return (
    <svg viewBox="0 0 48 32" width="48" height="32" aria-hidden>
      <path
        d="M8 9V2H15 M33 2H40V9 M40 23V30H33 M15 30H8V23 M1 16H47"
        fill="none"
        stroke="currentColor"
        strokeWidth="3"
      />
    </svg>
  )
}
