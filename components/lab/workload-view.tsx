'use client'

import Link from 'next/link'
import useSWR from 'swr'
import { weekName, WorkloadDrawing } from '@/components/charts/workload-drawing'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { fetcher, type ClientError } from '@/lib/http/fetcher'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { holidaysText, namedDay } from '@/lib/study/rules/working-days'
import { fullestWeek, workloadOf, type Workload, type WorkloadWeek } from '@/lib/study/rules/workload'
import type { LabWorkload } from '@/lib/study/queries/workload'
import { workloadKey } from '@/lib/study/keys'
import { ClosedDayPulls } from './closed-day-pulls'
import { labTabs } from './lab-tabs'

/** The weeks ahead: how many jars wait in each, on which days nobody is there, and whose are late. */
export function WorkloadView({ mayManage }: { mayManage: boolean }) {
  const { data } = useSWR<LabWorkload, ClientError>(workloadKey, fetcher)
  if (!data) return null
  const workload = workloadOf(data.due, data.calendar, data.today)
  const holidays = workload.weeks.flatMap((week) => week.holidays)
  return (
    <>
      <Heading
        crumb="The lab, jars to measure in all running studies"
        headline={<Headline workload={workload} />}
        sentence={sentenceOf(workload)}
        tabs={labTabs('workload', mayManage)}
        tabsLabel="The lab"
      />
      <div className="mt-7 grid grid-cols-1 gap-10">
        <div className="min-w-0">
          <WorkloadDrawing workload={workload} calendar={data.calendar} />
          <p className="mt-2 text-14 text-soft">
            Solid: jars that are opened and measured. Hollow: watch jars that are looked at. The shelf has a
            gap on every day on which nobody is here
            {holidays.length > 0 ? `, with a cross under a holiday: ${holidaysText(holidays)}` : ''}. The
            ruler counts weeks from this one.
          </p>
        </div>
        <ClosedDayPulls mayMove={mayManage} />
        <div className="grid gap-x-16 gap-y-10 grid-cols-1 xl:grid-cols-[3fr_2fr]">
          <Section title="Week by week">
            <Weeks workload={workload} />
          </Section>
          <Section title="Late" sentence="Planned before today and neither read nor missed with a reason.">
            <Late data={data} />
          </Section>
        </div>
      </div>
    </>
  )
}

function Headline({ workload }: { workload: Workload }) {
  const fullest = fullestWeek(workload)
  if (!fullest) return <>Nothing is planned in the next {workload.weeks.length} weeks</>
  return (
    <>
      <b>{counted(fullest.jars, 'jar').replace(/^./, (letter) => letter.toUpperCase())}</b> in the week of{' '}
      {spokenDay(fullest.monday, false)}: the fullest of the next {workload.weeks.length}
    </>
  )
}

function sentenceOf({ weeks, late }: Workload): string {
  const now = weeks[0]!
  const coming =
    now.jars === 0
      ? 'Nothing more is due this week'
      : `${capital(counted(now.jars, 'jar'))} ${now.jars === 1 ? 'is' : 'are'} still due this week`
  return `${coming}${late === 0 ? ', and nothing is late.' : `; ${counted(late, 'jar')} ${late === 1 ? 'is' : 'are'} late on top of that.`}`
}

function Weeks({ workload }: { workload: Workload }) {
  const today = workload.today
  const hasKind = (kind: keyof WorkloadWeek['byKind']) => workload.weeks.some((week) => week.byKind[kind] > 0)
  return (
    <Ledger
      caption="Jars to measure by week"
      rows={workload.weeks.filter((week) => week.jars > 0 || week.holidays.length > 0)}
      rowKey={(week) => week.monday}
      isQuiet={(week) => week.jars === 0}
      empty={<p className="text-15 text-soft">No running study asks for a jar.</p>}
      columns={[
        {
          key: 'week',
          title: 'week',
          cell: (week) => <span className="whitespace-nowrap">{weekName(week.monday, today)}</span>,
        },
        {
          key: 'jars',
          title: 'jars',
          align: 'right',
          cell: (week) => <b className="font-650">{week.jars}</b>,
        },
        { key: 'measuring', title: 'opened', align: 'right', cell: (week) => week.measuring },
        { key: 'watch', title: 'watched', align: 'right', cell: (week) => week.watch },
        ...(hasKind('freeze-thaw')
          ? [
              {
                key: 'thaw',
                title: 'freeze-thaw',
                align: 'right' as const,
                from: 'tablet' as const,
                cell: (week: WorkloadWeek) => week.byKind['freeze-thaw'] || '',
              },
            ]
          : []),
        ...(hasKind('transport')
          ? [
              {
                key: 'road',
                title: 'transport',
                align: 'right' as const,
                from: 'tablet' as const,
                cell: (week: WorkloadWeek) => week.byKind.transport || '',
              },
            ]
          : []),
        {
          key: 'closed',
          title: 'closed',
          from: 'tablet',
          cell: (week) => (week.holidays.length > 0 ? holidaysText(week.holidays) : ''),
        },
      ]}
    />
  )
}

function Late({ data }: { data: LabWorkload }) {
  return (
    <Ledger
      caption="Studies with jars that are late"
      rows={data.late}
      rowKey={(row) => row.code}
      empty={<p className="text-15 text-soft">Nothing is late.</p>}
      columns={[
        {
          key: 'study',
          title: 'study',
          cell: (row) => (
            <>
              <Link
                href={`/studies/${encodeURIComponent(row.code)}`}
                className="font-650 underline underline-offset-4"
              >
                {row.code}
              </Link>{' '}
              {row.title}
            </>
          ),
        },
        { key: 'jars', title: 'jars', align: 'right', cell: (row) => row.jars },
        { key: 'since', title: 'since', align: 'right', cell: (row) => namedDay(row.since, false) },
        {
          key: 'beyond',
          title: 'beyond the window',
          align: 'right',
          from: 'tablet',
          cell: (row) => row.beyondWindow || '',
        },
      ]}
    />
  )
}
