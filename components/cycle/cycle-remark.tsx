'use client'

import Link from 'next/link'
import useSWR from 'swr'
import type { CycleBoard } from '@/lib/cycle/queries/board'
import { cycleKeys } from '@/lib/cycle/keys'
import { fetcher } from '@/lib/http/fetcher'
import { whenText } from '@/lib/cycle/rules/half-words'
import { stateOf } from './cycle-words'
import { useServerClock } from './use-server-clock'

/** What stands at this station of the walk now, and how many halves are overdue. */
function useCycles(stationId: string) {
  const { data: board } = useSWR<CycleBoard>(cycleKeys.board, fetcher, { refreshInterval: 60_000 })
  const now = useServerClock(board?.now)
  const states = now
    ? (board?.places ?? []).filter((one) => one.stationId === stationId).map((one) => stateOf(one, now))
    : []
  const overdue = states.filter((state) => state.kind === 'running' && state.isOverdue).length
  return {
    board,
    now,
    states,
    overdue,
    alarm: `${overdue} ${overdue === 1 ? 'half is' : 'halves are'} overdue`,
  }
}

/** In the station's own row, also while it is closed. */
export function CycleAlarm({ stationId }: { stationId: string }) {
  const { overdue, alarm } = useCycles(stationId)
  return overdue > 0 ? <span className="block font-650 text-alarm">{alarm}</span> : null
}

/** At a freeze-thaw station of the walk: the board one press away, and what is overdue said here already. */
export function CycleRemark({ stationId }: { stationId: string }) {
  const { board, now, states, overdue, alarm } = useCycles(stationId)
  const due = states
    .flatMap((state) => (state.kind === 'running' && state.dueAt && !state.isOverdue ? [state.dueAt] : []))
    .toSorted((a, b) => Date.parse(a) - Date.parse(b))[0]
  const waiting = states.filter((state) => state.kind === 'waiting').length
  return (
    <Link
      href="/cycles"
      className="flex min-h-16 items-center justify-between gap-3 rounded border-2 border-dashed border-ink bg-paper px-4 text-18 leading-tight"
    >
      <b>Cycles</b>
      <span className={overdue > 0 ? 'font-650 text-alarm' : 'text-soft'}>
        {overdue > 0
          ? alarm
          : due && now && board
            ? `next at ${whenText(due, now, board.zone)}`
            : waiting > 0
              ? `${waiting} to begin`
              : board
                ? 'nothing runs'
                : ''}
      </span>
    </Link>
  )
}
