import Link from 'next/link'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import type { EnteredDay } from '@/lib/day/queries/days'
import { dayText } from '@/lib/report/rules'

/** Days with something entered at the Bench, and which of them a second person has seen. */
export function DayList({ days }: { days: EnteredDay[] }) {
  const open = days.filter((day) => day.unseen > 0)
  return (
    <>
      <Heading
        crumb="Days with entries, the last 120"
        headline={
          open.length === 0 ? (
            <>
              Every day is <b>reviewed</b>
            </>
          ) : (
            <>
              <b>{open.length}</b> {open.length === 1 ? 'day waits' : 'days wait'} for a second person
            </>
          )
        }
        sentence="Whoever has entered nothing that day looks at it and marks it. What comes later asks for another look."
      />
      <div className="mt-6">
        <Ledger
          caption="Days with entries"
          rows={days}
          rowKey={(day) => day.day}
          isQuiet={(day) => day.unseen === 0}
          empty={<p className="text-17">Days stand here once something is read at the Bench.</p>}
          columns={[
            {
              key: 'day',
              title: 'Day',
              cell: (day) => (
                <Link
                  href={`/days/${day.day}`}
                  className="whitespace-nowrap font-650 underline underline-offset-4"
                >
                  {dayText(day.day)}
                </Link>
              ),
            },
            { key: 'readings', title: 'Readings', align: 'right', cell: (day) => day.readings },
            { key: 'doubted', title: 'In doubt', align: 'right', cell: (day) => day.doubted || '' },
            { key: 'changed', title: 'Corrected', align: 'right', cell: (day) => day.changed || '' },
            { key: 'missed', title: 'Not read', align: 'right', cell: (day) => day.missed || '' },
            {
              key: 'by',
              title: 'Entered by',
              from: 'tablet',
              cell: (day) => day.by.map((one) => one.name).join(', '),
            },
            { key: 'state', title: 'Reviewed', cell: stateText },
          ]}
        />
      </div>
    </>
  )
}

function stateText(day: EnteredDay): string {
  if (day.reviewedBy === null) return 'not yet'
  const by = `by ${day.reviewedBy}, ${dayText(day.reviewedAt!)}`
  return day.unseen === 0 ? by : `${by}; ${day.unseen} after the review`
}
