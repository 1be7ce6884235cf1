'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readTyped } from '@/lib/number/rules'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { checkOf, DailyCheckFields, draftOf, type CheckDraft } from './daily-check-fields'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { InstrumentPage } from '@/lib/instrument/queries/list'
import { instrumentKeys } from '@/lib/instrument/keys'

type Instrument = Omit<InstrumentPage, 'calibrations' | 'checks'>
type Props = { instrument: Instrument | null; onClose: () => void; onDone: () => void }

/** An instrument as a manager describes it; a viscometer with the constants of its spindles. */
export function InstrumentDialog({ instrument, onClose, onDone }: Props) {
  const [id] = useState(() => instrument?.id ?? newId())
  const [code, setCode] = useState(instrument?.code ?? '')
  const [name, setName] = useState(instrument?.name ?? '')
  const [kind, setKind] = useState(instrument?.kind ?? 'meter')
  const [isActive, setIsActive] = useState(instrument?.isActive ?? true)
  const [spindles, setSpindles] = useState(() =>
    (instrument?.spindles ?? []).map((one) => ({ name: one.name, constant: String(one.constant) })),
  )
  const [daily, setDaily] = useState<CheckDraft>(() => draftOf(instrument?.dailyCheck ?? null))
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}

  async function save() {
    setBusy(true)
    setError(null)
    const body = {
      code,
      name,
      kind,
      spindles:
        kind === 'viscometer'
          ? spindles
              .filter((one) => one.name.trim() !== '')
              .map((one) => ({ name: one.name, constant: readTyped(one.constant) }))
          : [],
      dailyCheck: checkOf(kind, daily),
    }
    try {
      if (instrument) {
        await send(instrumentKeys.one(id), 'PUT', { ...body, version: instrument.version, isActive })
      } else {
        await send(instrumentKeys.list, 'POST', { ...body, id })
      }
      toast(instrument ? `${code} is changed` : `${code} is added`)
      onDone()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={instrument ? `Change ${instrument.code}` : 'A new instrument'}
      width={520}
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={save}>
            {instrument ? 'Keep the change' : 'Add it'}
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap items-start gap-3">
        <Field label="Code" value={code} onText={setCode} error={fields['code']} wrap="w-[110px]" />
        <Field
          label="Name"
          value={name}
          onText={setName}
          error={fields['name']}
          wrap="min-w-[180px] flex-1"
        />
        <Select
          label="Kind"
          value={kind}
          disabled={instrument !== null}
          options={[
            { value: 'meter', label: 'pH meter' },
            { value: 'viscometer', label: 'viscometer' },
            { value: 'balance', label: 'balance' },
          ]}
          onPick={(picked) => {
            setKind(picked)
            setDaily(null)
          }}
          wrap="w-[150px]"
        />
      </div>
      {kind === 'viscometer' ? (
        <div className="grid gap-3">
          {spindles.map((spindle, index) => (
            <div key={index} className="flex items-start gap-3">
              <Field
                label={`Spindle ${index + 1}`}
                value={spindle.name}
                onText={(text) =>
                  setSpindles((all) => all.map((one, at) => (at === index ? { ...one, name: text } : one)))
                }
                wrap="flex-1"
              />
              <NumberField
                label="Constant"
                value={spindle.constant}
                onText={(text) =>
                  setSpindles((all) =>
                    all.map((one, at) => (at === index ? { ...one, constant: text } : one)),
                  )
                }
                hint="mPa·s per % is this by rpm"
                error={fields[`spindles.${index}.constant`]}
                wrap="w-[200px]"
              />
            </div>
          ))}
          <div>
            <Button onClick={() => setSpindles((all) => [...all, { name: '', constant: '' }])}>
              Add a spindle
            </Button>
          </div>
        </div>
      ) : null}
      <DailyCheckFields kind={kind} draft={daily} fields={fields} onDraft={setDaily} />
      {instrument ? (
        <Checkbox label="In use" checked={isActive} onChange={(event) => setIsActive(event.target.checked)} />
      ) : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}
