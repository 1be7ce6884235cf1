'use client'

import { useState, type FormEvent } from 'react'
import useSWR, { useSWRConfig } from 'swr'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Ledger } from '@/components/ui/ledger'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { fetcher, send, type ClientError } from '@/lib/http/fetcher'
import type { HolidayRow } from '@/lib/holiday/queries'
import { readHolidays } from '@/lib/holiday/rules'
import { holidayKeys } from '@/lib/holiday/keys'
import { pullKeys } from '@/lib/pull/keys'
import { counted } from '@/lib/study/rules/words'
import { namedDay } from '@/lib/study/rules/working-days'

/** Holidays with their names: one typed or a block pasted, each removed by itself. */
export function HolidaysPart({ today }: { today: string }) {
  const { data: holidays = [], mutate } = useSWR<HolidayRow[], ClientError>(holidayKeys.list, fetcher)
  const { mutate: mutateOther } = useSWRConfig()
  const [typed, setTyped] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const [isPastShown, setPastShown] = useState(false)
  const read = readHolidays(typed)
  const past = holidays.filter((one) => one.day < today)
  const shown = isPastShown ? holidays : holidays.filter((one) => one.day >= today)

  async function changed() {
    await mutate()
    void mutateOther(pullKeys.moves)
  }

  async function add(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      const body = { holidays: read.holidays.map((one) => ({ id: newId(), ...one })) }
      await keep(() => send(holidayKeys.list, 'POST', body), { what: 'holidays', text: typed })
      await changed()
      setTyped('')
      toast(read.holidays.length === 1 ? 'The holiday is added' : `${read.holidays.length} days are added`)
    } catch (thrown) {
      setError(thrown)
    } finally {
      setSending(false)
    }
  }

  async function remove(holiday: HolidayRow) {
    setError(null)
    try {
      await send(holidayKeys.one(holiday.id), 'DELETE', {})
      await changed()
      toast(`${holiday.name} is removed; pulls that were moved stay where they are`)
    } catch (thrown) {
      setError(thrown)
      void mutate()
    }
  }

  return (
    <div className="grid gap-4">
      <Ledger
        caption="Holidays of the lab"
        rows={shown}
        rowKey={(row) => row.id}
        isQuiet={(row) => row.day < today}
        empty={<p className="text-15 text-soft">No holiday lies ahead.</p>}
        columns={[
          { key: 'day', title: 'day', width: '11rem', cell: (row) => namedDay(row.day) },
          { key: 'name', title: 'holiday', cell: (row) => row.name },
          { key: 'by', title: 'added by', from: 'tablet', cell: (row) => row.addedBy },
          {
            key: 'acts',
            title: <span className="sr-only">Acts</span>,
            align: 'right',
            cell: (row) => (
              <Button
                kind="link"
                aria-label={`Remove ${row.name}, ${namedDay(row.day)}`}
                onClick={() => void remove(row)}
              >
                Remove
              </Button>
            ),
          },
        ]}
      />
      {past.length > 0 ? (
        <Button kind="link" className="justify-self-start" onClick={() => setPastShown(!isPastShown)}>
          {isPastShown ? 'Hide those behind us' : `Show ${counted(past.length, 'day')} behind us`}
        </Button>
      ) : null}
      <form method="post" onSubmit={add} noValidate className="grid gap-3">
        <TextArea
          label="Add holidays"
          hint="One on a line, the day and its name: 24 Dec 2026 Christmas Eve. A block from a spreadsheet can be pasted; 2026-12-28 to 2026-12-31 winter break is four days."
          value={typed}
          onText={setTyped}
          error={read.faults.length > 0 ? read.faults.join(' ') : undefined}
        />
        <ErrorNote error={error} />
        <Button
          type="submit"
          busy={isSending}
          why={
            read.holidays.length === 0
              ? 'No day is typed yet.'
              : read.faults.length > 0
                ? 'Correct the lines first.'
                : undefined
          }
          className="self-start"
        >
          {read.holidays.length > 1 ? `Add ${read.holidays.length} days` : 'Add the holiday'}
        </Button>
      </form>
    </div>
  )
}
