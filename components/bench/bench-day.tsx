'use client'

import { useState } from 'react'
import { FindJar } from '@/components/bench/find-jar'
import { JarRow } from '@/components/bench/jar-row'
import { codesKept } from '@/components/bench/kept-jars'
import { TinyJar } from '@/components/bench/tiny-jar'
import { Tray } from '@/components/device/tray'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { heatLine } from '@/components/marks/heat'
import { CycleAlarm, StationActs } from '@/components/station/station-acts'
import { StationLabel } from '@/components/ui/station-label'
import type { Bench, BenchStation } from '@/lib/bench/queries/today'
import { dayText } from '@/lib/report/rules'
import { periodText } from '@/lib/station/rules/downtime'

type Props = { bench: Bench; outbox: OutboxOnScreen; onOpen: (code: string) => void }

/** Today, in the order one walks the stations. The first with something to do is open; any can be. */
export function BenchDay({ bench, outbox, onOpen }: Props) {
  const first = bench.stations.find((s) => s.counts.due + s.counts.resting > 0)?.id ?? null
  const [picked, setPicked] = useState<string | null>(null)
  const [finding, setFinding] = useState<'scanning' | 'typing' | null>(null)
  const openId = picked ?? first
  const { total, done, missed } = bench.counts
  const left = total - done - missed
  const kept = codesKept(outbox.items)
  return (
    <div className="mx-auto flex min-h-[calc(100dvh-64px)] max-w-[820px] flex-col">
      <div className="flex flex-wrap items-center justify-between gap-3 px-4 pt-3 sm:px-5">
        <div>
          <p className="text-18 text-soft">{weekday(bench.today)}</p>
          <h1 className="text-36 leading-tight tracking-[-0.01em]">
            {total === 0 ? (
              <>
                <b>Nothing</b> is due
              </>
            ) : left === 0 ? (
              <>
                <b>All {total}</b> are read
              </>
            ) : (
              <>
                <b>{done}</b> of {total} jars
              </>
            )}
          </h1>
          {total === 0 && bench.next ? <p>Next: {dayText(bench.next)}.</p> : null}
          {left === 0 && total > 0 && bench.next ? <p>Next: {dayText(bench.next)}.</p> : null}
          {bench.counts.overdue > 0 ? (
            <p className="font-650 text-alarm">
              {bench.counts.overdue} {bench.counts.overdue === 1 ? 'is' : 'are'} past the window
            </p>
          ) : null}
        </div>
        <Tray outbox={outbox} />
      </div>
      <ol className="mt-3 flex-1">
        {bench.stations.map((station) => (
          <Station
            key={station.id}
            station={station}
            isOpen={station.id === openId}
            kept={kept}
            onPick={() => setPicked(station.id)}
            onOpen={onOpen}
          />
        ))}
      </ol>
      <div className="sticky bottom-0 mt-3 flex gap-3 bg-ground px-4 pb-3 pt-3 sm:px-5">
        <button
          type="button"
          data-kind="primary"
          className="btn min-w-0 flex-1"
          onClick={() => setFinding('scanning')}
        >
          <ScanMark /> Scan a label
        </button>
        <button type="button" className="btn" onClick={() => setFinding('typing')}>
          Type a code
        </button>
      </div>
      {finding ? (
        <FindJar
          bench={bench}
          isScanning={finding === 'scanning'}
          onOpen={onOpen}
          onClose={() => setFinding(null)}
        />
      ) : null}
    </div>
  )
}

type StationProps = {
  station: BenchStation
  isOpen: boolean
  kept: Set<string>
  onPick: () => void
  onOpen: (code: string) => void
}

function Station({ station, isOpen, kept, onPick, onOpen }: StationProps) {
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
                  className={kept.has(jar.code) ? 'border-x-2 border-b-2 border-ink px-0.5' : ''}
                >
                  <TinyJar
                    standing={jar.standing}
                    layers={jar.layers}
                    state={kept.has(jar.code) ? 'done' : jar.state}
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
          <p className="py-2 text-17">
            {station.name}. {station.caution ? <b>{station.caution}</b> : null}
          </p>
          {station.downtime ? (
            <p className="pb-2 text-17">
              Out of use {periodText(station.downtime)}: {station.downtime.reason}
            </p>
          ) : null}
          <StationActs station={station} />
          <ul className="flex flex-col gap-3">
            {[...open, ...station.jars.filter((j) => !open.includes(j))].map((jar) => (
              <JarRow key={jar.pullJarId} jar={jar} isKept={kept.has(jar.code)} onOpen={onOpen} />
            ))}
          </ul>
        </div>
      ) : null}
    </li>
  )
}

/** What is read stands first, as it fills along the shelf; what is to come is dotted behind it. */
function inOrder(jars: BenchStation['jars']): BenchStation['jars'] {
  const rank = { done: 0, missed: 1, resting: 2, due: 3 }
  return jars.toSorted((a, b) => rank[a.state] - rank[b.state])
}

function remark(station: BenchStation, open: number, leaning: number): string {
  if (station.jars.length === 0) return station.next ? dayText(station.next.dueOn) : 'nothing planned'
  if (open > 0) return `${open} to read`
  if (leaning > 0) return `${leaning} ${leaning === 1 ? 'leans' : 'lean'}`
  return 'all read'
}

function weekday(day: string): string {
  const name = new Date(`${day}T12:00:00`).toLocaleDateString('en-GB', { weekday: 'long' })
  return `${name}, ${dayText(day)}`
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
