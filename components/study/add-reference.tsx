'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readTyped } from '@/lib/number/rules'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { emulsionTypes, type EmulsionType } from '@/lib/formula/schema'
import { ClientError, send } from '@/lib/http/fetcher'
import { referenceKeys } from '@/lib/reference/keys'

/** A bought-in product, of which a name and a lot are known and no formula. */
export function AddReference({ onAdded }: { onAdded: (id: string) => void }) {
  const [isOpen, setIsOpen] = useState(false)
  const [id, setId] = useState(newId)
  const [name, setName] = useState('')
  const [lot, setLot] = useState('')
  const [grams, setGrams] = useState('')
  const [emulsionType, setEmulsionType] = useState<EmulsionType>('water-in-oil')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}

  async function add() {
    setBusy(true)
    setError(null)
    try {
      const body = { id, name, lot, emulsionType, grams: readTyped(grams) }
      const made = await send<{ code: string }>(referenceKeys.add, 'POST', body)
      toast(`${name.trim()} stands in the list as ${made.code}`)
      setIsOpen(false)
      setId(newId())
      setName('')
      setLot('')
      setGrams('')
      onAdded(id)
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <>
      <Button onClick={() => setIsOpen(true)}>Add a reference product</Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title="Add a reference product"
        sentence="Bought in, to stand beside a study. Its formula is not known here, and nothing of it is weighed."
        width={520}
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={busy} onClick={add}>
              Add it
            </Button>
          </>
        }
      >
        <Field label="Name" value={name} onText={setName} error={fields['name']} />
        <div className="flex flex-wrap gap-3">
          <Field label="Lot" value={lot} onText={setLot} error={fields['lot']} wrap="min-w-[160px] flex-1" />
          <NumberField
            label="There is of it"
            unit="g"
            value={grams}
            onText={setGrams}
            error={fields['grams']}
            wrap="w-[150px]"
          />
        </div>
        <Select
          label="Made as"
          value={emulsionType}
          options={emulsionTypes.map((value) => ({ value, label: value }))}
          onPick={(value) => setEmulsionType(value as EmulsionType)}
          error={fields['emulsionType']}
          hint="It decides how pH and viscosity are read."
        />
        <ErrorNote error={error} />
      </Dialog>
    </>
  )
}
