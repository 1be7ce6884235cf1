'use client'

import { useState } from 'react'
import { useOutbox } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { newId } from '@/lib/db/id'
import { ClientError } from '@/lib/http/fetcher'
import type { InstrumentRow } from '@/lib/instrument/queries/list'
import { judgeDailyCheck, type DailyResult } from '@/lib/instrument/rules/daily-check'
import { instrumentKeys } from '@/lib/instrument/keys'
import type { DailyCheck } from '@/lib/instrument/schema'
import type { LotRow } from '@/lib/lot/queries'
import { readDecimal } from '@/lib/number/rules'
import { ScienceError } from '@/lib/science/guard'

type Props = {
  instrument: InstrumentRow & { dailyCheck: DailyCheck }
  lots: LotRow[]
  today: string
  onDone: () => void
}

/** One instrument of the morning: what it should show stands beside what it shows, and how that is judged. */
export function CheckRow({ instrument, lots, today, onDone }: Props) {
  const check = instrument.dailyCheck
  const [id, setId] = useState(newId)
  const [read, setRead] = useState('')
  const [temperature, setTemperature] = useState(check.kind === 'balance' ? '' : String(startC(check)))
  const [lotId, setLotId] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const outbox = useOutbox((item) => (item.about.kind === 'check' ? onDone() : undefined))
  const bottles = lots.filter(
    (lot) => !lot.isUsedUp && lot.kind === (check.kind === 'meter' ? 'buffer' : 'check fluid'),
  )
  const lot = bottles.find((bottle) => bottle.id === lotId) ?? null
  const typed = { read: readDecimal(read), temperatureC: readDecimal(temperature) }
  const judged = typed.read === null ? null : judge(check, { ...typed, read: typed.read }, lot, today)
  const asks = error instanceof ClientError && error.code === 'confirm'
  const fields = error instanceof ClientError ? error.fields : {}

  async function keep() {
    setBusy(true)
    setError(null)
    try {
      const deviceNow = new Date().toISOString()
      await outbox.send({
        url: instrumentKeys.checks(instrument.id),
        body: {
          id,
          claimedAt: deviceNow,
          deviceNow,
          read: typed.read,
          temperatureC: typed.temperatureC,
          lotId: lot?.id ?? null,
          isConfirmed: asks,
        },
        about: { kind: 'check', label: `Daily check of ${instrument.code}`, subject: instrument.id },
      })
      setId(newId())
      setRead('')
      onDone()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-end gap-3">
        {check.kind === 'balance' ? null : (
          <>
            {bottles.length > 0 ? (
              <Select
                label="Bottle"
                density="bench"
                value={lotId}
                empty={check.kind === 'meter' ? 'by the table' : 'as set'}
                options={bottles.map((one) => ({ value: one.id, label: `${one.name}, lot ${one.lot}` }))}
                onPick={setLotId}
                wrap="w-[200px]"
              />
            ) : null}
            <NumberField
              label="At"
              unit="°C"
              density="bench"
              value={temperature}
              onText={setTemperature}
              error={fields['temperatureC']}
              wrap="w-[124px]"
            />
          </>
        )}
        <NumberField
          label={judgedLabel(check, typed.temperatureC, lot)}
          unit={units[check.kind]}
          density="bench"
          value={read}
          onText={setRead}
          error={fields['read']}
          wrap="min-w-[200px] flex-1"
        />
        <Button
          density="bench"
          kind={asks || judged?.result === 'doubtful' ? 'danger-asked' : 'primary'}
          busy={isBusy}
          onClick={keep}
        >
          {asks ? 'It is so: keep it' : 'Keep it'}
        </Button>
      </div>
      <p
        aria-live="polite"
        className={`text-18 ${judged?.result === 'doubtful' ? 'font-650 text-alarm' : ''}`}
      >
        {judged ? `${judged.result === 'good' ? 'Good.' : 'Doubtful.'} ${judged.sentence}` : ''}
      </p>
      <ErrorNote error={error} />
    </div>
  )
}

const units = { meter: 'pH', viscometer: 'mPa·s', balance: 'g' }

function startC(check: Exclude<DailyCheck, { kind: 'balance' }>): number {
  return check.kind === 'viscometer' ? check.temperatureC : 25
}

function judge(
  check: DailyCheck,
  reading: { read: number; temperatureC: number | null },
  lot: LotRow | null,
  today: string,
): DailyResult | null {
  try {
    return judgeDailyCheck(check, reading, lot, today)
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

/** "Shows, of 4.01": what is known stands in the label. */
function judgedLabel(check: DailyCheck, temperatureC: number | null, lot: LotRow | null): string {
  const judged = judge(check, { read: 1, temperatureC }, lot, '')
  if (!judged) return 'Shows'
  const places = check.kind === 'meter' ? 2 : check.kind === 'balance' ? 2 : 0
  return `Shows, of ${judged.expected.toFixed(places)}`
}
