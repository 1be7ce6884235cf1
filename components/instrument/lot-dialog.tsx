'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { lotKeys } from '@/lib/lot/keys'
import { readTyped } from '@/lib/number/rules'

type Line = { temperature: string; value: string }

/** A bottle as its label and its certificate have it. */
export function LotDialog({ onClose, onDone }: { onClose: () => void; onDone: () => void }) {
  const [id] = useState(newId)
  const [kind, setKind] = useState('buffer')
  const [texts, setTexts] = useState({ name: '', lot: '', expiresOn: '', openedOn: '', keepsDays: '' })
  const [lines, setLines] = useState<Line[]>([{ temperature: '25', value: '' }])
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const set = (change: Partial<typeof texts>) => setTexts((before) => ({ ...before, ...change }))
  const setLine = (index: number, change: Partial<Line>) =>
    setLines((all) => all.map((one, at) => (at === index ? { ...one, ...change } : one)))

  async function keep() {
    setBusy(true)
    setError(null)
    try {
      await send(lotKeys.list, 'POST', {
        id,
        kind,
        name: texts.name,
        lot: texts.lot,
        expiresOn: texts.expiresOn,
        openedOn: texts.openedOn || null,
        keepsDays: readTyped(texts.keepsDays),
        certificate: lines.map((line) => ({
          temperatureC: readTyped(line.temperature),
          value: readTyped(line.value),
        })),
      })
      onDone()
      onClose()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      width={560}
      onClose={onClose}
      title="A new lot"
      sentence="As the bottle and its certificate have it."
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={keep}>
            Add it
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap items-start gap-3">
        <Select
          label="Kind"
          value={kind}
          options={[
            { value: 'buffer', label: 'buffer' },
            { value: 'check fluid', label: 'check fluid' },
          ]}
          onPick={setKind}
          wrap="w-[150px]"
        />
        <Field
          label="Name"
          value={texts.name}
          onText={(name) => set({ name })}
          error={fields['name']}
          wrap="min-w-[180px] flex-1"
        />
        <Field
          label="Lot"
          value={texts.lot}
          onText={(lot) => set({ lot })}
          error={fields['lot']}
          wrap="w-[140px]"
        />
      </div>
      {lines.map((line, index) => (
        <div key={index} className="flex flex-wrap items-start gap-3">
          <NumberField
            label={kind === 'buffer' ? 'pH' : 'Viscosity'}
            unit={kind === 'buffer' ? undefined : 'mPa·s'}
            value={line.value}
            onText={(value) => setLine(index, { value })}
            error={fields[`certificate.${index}.value`]}
            wrap="w-[170px]"
          />
          <NumberField
            label="at"
            unit="°C"
            value={line.temperature}
            onText={(temperature) => setLine(index, { temperature })}
            error={fields[`certificate.${index}.temperatureC`]}
            wrap="w-[130px]"
          />
        </div>
      ))}
      <div>
        <Button kind="link" onClick={() => setLines((all) => [...all, { temperature: '', value: '' }])}>
          Its value at another temperature
        </Button>
      </div>
      <div className="flex flex-wrap items-start gap-3">
        <Field
          type="date"
          label="Expires on"
          value={texts.expiresOn}
          onText={(expiresOn) => set({ expiresOn })}
          error={fields['expiresOn']}
          wrap="w-[170px]"
        />
        <Field
          type="date"
          label="Opened on"
          value={texts.openedOn}
          onText={(openedOn) => set({ openedOn })}
          error={fields['openedOn']}
          wrap="w-[170px]"
        />
        <NumberField
          label="Keeps, once open"
          unit="days"
          value={texts.keepsDays}
          onText={(keepsDays) => set({ keepsDays })}
          error={fields['keepsDays']}
          wrap="w-[150px]"
        />
      </div>
      <ErrorNote error={error} />
    </Dialog>
  )
}
