'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { RadioGroup } from '@/components/ui/radio-group'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'
import { stationKeys } from '@/lib/station/keys'
import type { LoggerPreview } from '@/lib/station/schema'
import { counted } from '@/lib/study/rules/words'
import { LoggerFound } from './logger-found'

type Props = { station: { id: string; name: string }; onClose: () => void; onDone: () => void }
type Choices = { order?: string; unit?: string; column?: string }

/** A logger's file: shown first as it would be read, with each row that cannot be taken; then taken in one go. */
export function LoggerDialog({ station, onClose, onDone }: Props) {
  const [id, setId] = useState(newId)
  const [file, setFile] = useState<File | null>(null)
  const [choices, setChoices] = useState<Choices>({})
  const [found, setFound] = useState<LoggerPreview | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)

  async function ask(chosen: File, given: Choices, isTaken: boolean) {
    setBusy(true)
    setError(null)
    const form = new FormData()
    for (const [name, value] of Object.entries({ id, isTaken: String(isTaken), ...given }))
      form.set(name, value)
    form.set('file', chosen)
    try {
      const answer = await send<LoggerPreview>(stationKeys.loggerFiles(station.id), 'POST', form)
      if (isTaken) {
        toast(`${counted(answer.freshRows, 'temperature')} are taken for ${station.name}`)
        onDone()
        onClose()
      } else {
        setFound(answer)
      }
    } catch (thrown) {
      setFound(isTaken ? found : null)
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  function choose(change: Choices) {
    const given = { ...choices, ...change }
    setChoices(given)
    if (file) void ask(file, given, false)
  }

  return (
    <Dialog
      isOpen
      width={720}
      onClose={onClose}
      title={`A logger's file for ${station.name}`}
      sentence="CSV as the logger wrote it. It is read and shown first; nothing is kept until you take it."
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button
            kind="primary"
            busy={busy}
            why={whyNot(file, found)}
            onClick={() => (file ? void ask(file, choices, true) : undefined)}
          >
            {found && found.freshRows > 0 ? `Take ${counted(found.freshRows, 'temperature')}` : 'Take them'}
          </Button>
        </>
      }
    >
      <label className="block">
        <span className="text-15 font-600">File</span>
        <input
          type="file"
          accept=".csv,.txt,text/csv,text/plain"
          className="mt-1 block w-full text-15 file:mr-3 file:min-h-11 file:rounded file:border file:border-rule file:bg-paper file:px-3"
          onChange={(event) => {
            const chosen = event.target.files?.[0] ?? null
            setFile(chosen)
            setFound(null)
            setChoices({})
            setId(newId())
            if (chosen) void ask(chosen, {}, false)
          }}
        />
      </label>
      {found?.asks === 'order' || choices.order ? (
        <RadioGroup
          label="Its dates can be read two ways: which number comes first?"
          value={choices.order ?? null}
          onPick={(order) => choose({ order })}
          options={[
            { value: 'day first', label: 'the day, as in 31/12' },
            { value: 'month first', label: 'the month, as in 12/31' },
          ]}
        />
      ) : null}
      {found ? (
        <div className="flex flex-wrap gap-3">
          <Select
            label="Temperature is in"
            value={String(found.readAs.column)}
            options={found.readAs.columns.flatMap((label, index) =>
              found.readAs.timeColumns.includes(index) ? [] : [{ value: String(index), label }],
            )}
            onPick={(column) => choose({ column })}
            wrap="min-w-[200px] flex-1"
          />
          <Select
            label="Unit"
            value={found.readAs.unit}
            options={[
              { value: 'C', label: '°C' },
              { value: 'F', label: '°F' },
            ]}
            onPick={(unit) => choose({ unit })}
            wrap="w-[100px]"
          />
        </div>
      ) : null}
      {found && found.asks === null ? <LoggerFound found={found} /> : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}

function whyNot(file: File | null, found: LoggerPreview | null): string | undefined {
  if (!file) return 'Choose a file.'
  if (!found) return 'It is not read yet.'
  if (found.asks) return 'Say first how its dates are read.'
  return found.freshRows === 0 ? 'There is nothing new in it.' : undefined
}
