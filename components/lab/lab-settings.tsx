'use client'

import useSWR from 'swr'
import { Heading } from '@/components/ui/heading'
import { Section } from '@/components/ui/section'
import { fetcher, type ClientError } from '@/lib/http/fetcher'
import type { HolidayRow } from '@/lib/holiday/queries'
import { holidayKeys } from '@/lib/holiday/keys'
import type { Lab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/keys'
import type { ClosedDayPull } from '@/lib/pull/queries/on-closed-days'
import { pullKeys } from '@/lib/pull/keys'
import { counted, capital, listed } from '@/lib/study/rules/words'
import { namedDay, weekdays } from '@/lib/study/rules/working-days'
import { ClosedDayPulls } from './closed-day-pulls'
import { HolidaysPart } from './holidays-part'
import { LabForm } from './lab-form'
import { labTabs } from './lab-tabs'
import { OwnSheetForm } from './own-sheet-form'
import { WorkingDaysForm } from './working-days-form'

/** What the lab decides for itself: its days, its name and clock, its label sheet. */
export function LabSettings({ today, timeZones }: { today: string; timeZones: string[] }) {
  const { data: lab } = useSWR<Lab, ClientError>(labKey, fetcher)
  const { data: holidays = [] } = useSWR<HolidayRow[], ClientError>(holidayKeys.list, fetcher)
  const { data: pulls = [] } = useSWR<ClosedDayPull[], ClientError>(pullKeys.moves, fetcher)
  if (!lab) return null
  const next = holidays.find((one) => one.day >= today)
  return (
    <>
      <Heading
        crumb={lab.name}
        headline={
          pulls.length > 0 ? (
            <>
              <b>{capital(counted(pulls.length, 'planned pull'))}</b>{' '}
              {pulls.length === 1 ? 'stands' : 'stand'} on days on which nobody is here
            </>
          ) : (
            <>
              The lab works <b>{workingDaysText(lab.workingDays)}</b>
            </>
          )
        }
        sentence={`${
          pulls.length > 0 ? `The lab works ${workingDaysText(lab.workingDays)}. ` : ''
        }${next ? `The next holiday is ${next.name}, ${namedDay(next.day)}.` : 'No holiday lies ahead.'} Studies that start from now on are laid on its days.`}
        tabs={labTabs('settings', true)}
        tabsLabel="The lab"
      />
      <div className="mt-7 grid grid-cols-1 gap-10">
        <ClosedDayPulls mayMove />
        <div className="grid grid-cols-1 gap-x-16 gap-y-10 lg:grid-cols-2">
          <Section
            title="Working days"
            sentence="A pull is planned on the nearest working day of its window; of two equally near ones on the later, because a jar that is read early has not stood as long as its time point says."
          >
            <WorkingDaysForm />
          </Section>
          <Section title="Name and clock" sentence="Days, pulls and mails follow the lab’s own clock.">
            <LabForm timeZones={timeZones} />
          </Section>
          <Section
            title="Holidays"
            sentence="A holiday moves no pull that is planned already; it is offered above."
          >
            <HolidaysPart today={today} />
          </Section>
          <Section
            title="The lab’s own label sheet"
            sentence="Measured with a ruler on an empty sheet. It is then offered wherever labels are printed."
          >
            <OwnSheetForm />
          </Section>
        </div>
      </div>
    </>
  )
}

/** "Monday to Friday", "every day", "Monday, Wednesday and Friday". */
export function workingDaysText(days: number[]): string {
  if (days.length === 7) return 'every day'
  const [first, last] = [days[0]!, days.at(-1)!]
  const isRun = last - first === days.length - 1 && days.length > 2
  const name = (day: number) => weekdays[day - 1]!
  return isRun ? `${name(first)} to ${name(last)}` : `on ${listed(days.map(name))}`
}
