'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import type { InstrumentRow } from '@/lib/instrument/queries/list'
import type { DailyCheck } from '@/lib/instrument/schema'
import type { LotRow } from '@/lib/lot/queries'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, numberWord } from '@/lib/study/rules/words'
import { CheckRow } from './check-row'

type Props = {
  instruments: InstrumentRow[]
  lots: LotRow[]
  today: string
  timeZone: string
  mayCheck: boolean
}
type Checked = InstrumentRow & { dailyCheck: DailyCheck }

/** The instruments in use, each with its check of the morning; what was checked today stands as done. */
export function MorningChecks({ instruments, lots, today, timeZone, mayCheck }: Props) {
  const router = useRouter()
  const checked = instruments.filter((one): one is Checked => one.isActive && one.dailyCheck !== null)
  const isDone = (one: InstrumentRow) => one.checkedAt !== null && dayIn(timeZone, one.checkedAt) === today
  const left = checked.filter((one) => !isDone(one)).length
  const bad = checked.filter((one) => isDone(one) && one.checkResult === 'doubtful').length
  return (
    <div className="mx-auto max-w-[900px]">
      <Heading
        crumb={
          <>
            <Link href="/instruments">Instruments</Link>, daily checks, {spokenDay(today)}
          </>
        }
        headline={
          checked.length === 0 ? (
            'No instrument has a daily check yet'
          ) : bad > 0 ? (
            <>
              <b className="text-alarm">
                {capital(numberWord(bad))} {bad === 1 ? 'instrument is' : 'instruments are'} in doubt
              </b>{' '}
              today
            </>
          ) : left === 0 ? (
            <>
              <b>Every check</b> is done today
            </>
          ) : (
            <>
              <b>
                {capital(numberWord(left))} of {numberWord(checked.length)}
              </b>{' '}
              to check
            </>
          )
        }
        sentence={bad > 0 ? 'Readings taken with it carry a doubt until it is good again.' : undefined}
      />
      {checked.length === 0 ? (
        <Empty
          title="Balance, viscometer and meter will stand here each morning"
          sentence="A manager says at each instrument what is checked: the weight, the fluid, the buffer."
        />
      ) : null}
      <ul className="mt-6 grid gap-8" data-density="bench">
        {checked.map((one) => (
          <li key={one.id}>
            <div className="mb-3 flex flex-wrap items-baseline justify-between gap-x-4 border-b-2 border-ink pb-1">
              <h2 className="text-26">
                <Link href={`/instruments/${one.id}`} className="font-700 underline underline-offset-4">
                  {one.code}
                </Link>{' '}
                {one.name}
              </h2>
              <p
                className={`text-18 ${isDone(one) && one.checkResult === 'doubtful' ? 'font-650 text-alarm' : ''}`}
              >
                {isDone(one)
                  ? `${one.checkResult === 'good' ? 'Good' : 'Doubtful'} today, by ${one.checkedBy}`
                  : one.checkedAt
                    ? `last checked ${spokenDay(dayIn(timeZone, one.checkedAt))}`
                    : 'never checked yet'}
              </p>
            </div>
            {isDone(one) ? <p className="text-18 text-soft">{one.checkDetail?.sentence}</p> : null}
            {mayCheck && (!isDone(one) || one.checkResult === 'doubtful') ? (
              <CheckRow instrument={one} lots={lots} today={today} onDone={() => router.refresh()} />
            ) : null}
          </li>
        ))}
      </ul>
    </div>
  )
}
