import { LightSwitch } from '@/components/bench/light-switch'
import { Tray } from '@/components/device/tray'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import type { Bench } from '@/lib/bench/queries/today'
import { spokenDay } from '@/lib/study/rules/calendar'

type Props = {
  bench: Bench
  outbox: OutboxOnScreen
  /** For going on without network. */
  isReady: boolean
}

/** The day as a finding: how far it is, what is late, when the next jars come. */
export function DayHead({ bench, outbox, isReady }: Props) {
  const { total, done, missed, overdue, resting } = bench.counts
  const left = total - done - missed
  const ready = bench.stations.flatMap((s) => s.jars).filter((jar) => jar.isReady).length
  return (
    <>
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
                <b>All {total}</b> are {missed > 0 ? 'done with' : 'read'}
              </>
            ) : (
              <>
                <b>{done}</b> of {total} jars
              </>
            )}
          </h1>
          {left === 0 && bench.next ? <p>Next: {spokenDay(bench.next)}.</p> : null}
          {overdue > 0 ? (
            <p className="font-650 text-alarm">
              {overdue} {overdue === 1 ? 'is' : 'are'} past the window
            </p>
          ) : null}
          {resting > 0 ? (
            <p className="text-17 text-soft">
              {[
                ready > 0 ? `${ready} rested and ready` : '',
                resting > ready ? `${resting - ready} still resting` : '',
              ]
                .filter(Boolean)
                .join(', ')}
            </p>
          ) : null}
        </div>
        <div className="flex flex-wrap items-center gap-3">
          {isReady && outbox.isOnline && outbox.items.length === 0 ? (
            <p className="order-last text-17 text-soft sm:order-none">Ready without network</p>
          ) : null}
          <Tray outbox={outbox} />
          <LightSwitch />
        </div>
      </div>
      {total > 0 ? <DayLine counts={bench.counts} /> : null}
    </>
  )
}

/** The day as a line: read is drawn, missed is crossed, what is to come is dotted. */
function DayLine({ counts: { total, done, missed, resting } }: { counts: Bench['counts'] }) {
  return (
    <svg
      viewBox={`0 0 ${total} 3`}
      preserveAspectRatio="none"
      role="img"
      aria-label={`${done} read, ${missed} not read, ${resting} resting, ${total - done - missed - resting} to read`}
      className="mx-4 mt-2 h-3 w-[calc(100%-32px)] sm:mx-5 sm:w-[calc(100%-40px)]"
    >
      <path
        d={`M0 2H${total}`}
        stroke="var(--rule)"
        strokeWidth="2"
        strokeDasharray="2 4"
        vectorEffect="non-scaling-stroke"
        fill="none"
      />
      <path
        d={`M${done} 2H${done + missed}`}
        stroke="var(--rule)"
        strokeWidth="4"
        vectorEffect="non-scaling-stroke"
        fill="none"
      />
      <path
        d={`M0 2H${done}`}
        stroke="var(--ink)"
        strokeWidth="7"
        vectorEffect="non-scaling-stroke"
        fill="none"
      />
    </svg>
  )
}

function weekday(day: string): string {
  const name = new Date(`${day}T12:00:00`).toLocaleDateString('en-GB', { weekday: 'long' })
  return `${name}, ${spokenDay(day)}`
}
