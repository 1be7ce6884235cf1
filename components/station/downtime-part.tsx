'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Section } from '@/components/ui/section'
import type { Downtime, TouchedPull } from '@/lib/station/queries/downtimes'
import { periodText } from '@/lib/station/rules/downtime'
import type { Leaving } from '@/lib/station/rules/occupancy'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital } from '@/lib/study/rules/words'
import { CancelDowntimeDialog, DowntimeDialog } from './downtime-dialogs'
import { Touched } from './touched'

type Props = {
  station: { id: string; name: string }
  downtimes: Downtime[]
  pulls: TouchedPull[]
  leavings: Leaving[]
  today: string
  mayWrite: boolean
  onDone: () => void
}

/** Days ahead on which nothing can be pulled here, and what falls into them. Nothing to show and to do: no part. */
export function DowntimePart({ station, downtimes, pulls, leavings, today, mayWrite, onDone }: Props) {
  const [isPlanning, setPlanning] = useState(false)
  const [cancelled, setCancelled] = useState<Downtime | null>(null)
  if (downtimes.length === 0 && !mayWrite) return null
  return (
    <Section
      title="Out of use"
      sentence={
        downtimes.length === 0
          ? 'No day is planned on which this station is down.'
          : 'Planned days on which nothing is pulled here.'
      }
      aside={mayWrite ? <Button onClick={() => setPlanning(true)}>Plan days out of use</Button> : undefined}
    >
      <ul className="divide-y divide-hair">
        {downtimes.map((one) => (
          <li key={one.id} className={`py-3 ${one.cancelledAt ? 'text-soft' : ''}`}>
            <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
              <p>
                <b className={one.cancelledAt ? 'font-430 line-through' : 'font-650'}>
                  {capital(periodText(one))}
                </b>
                : {one.reason} <span className="text-soft">{one.plannedBy}</span>
              </p>
              {mayWrite && !one.cancelledAt ? (
                <Button
                  kind="link"
                  aria-label={`Cancel ${periodText(one)}`}
                  onClick={() => setCancelled(one)}
                >
                  Cancel
                </Button>
              ) : null}
            </div>
            {one.cancelledAt ? (
              <p className="text-15">
                Cancelled by {one.cancelledBy} on {spokenDay(one.cancelledAt)}: {one.cancelReason}
              </p>
            ) : (
              <Touched period={one} pulls={pulls} leavings={leavings} />
            )}
          </li>
        ))}
      </ul>
      {isPlanning ? (
        <DowntimeDialog
          station={station}
          pulls={pulls}
          leavings={leavings}
          today={today}
          onClose={() => setPlanning(false)}
          onDone={onDone}
        />
      ) : null}
      {cancelled ? (
        <CancelDowntimeDialog
          station={station}
          downtime={cancelled}
          onClose={() => setCancelled(null)}
          onDone={onDone}
        />
      ) : null}
    </Section>
  )
}
