'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { readTyped } from '@/lib/number/rules'
import { toast } from '@/components/ui/toast'
import { ClientError, send } from '@/lib/http/fetcher'
import type { JarRow } from '@/lib/jar/queries/jars'
import { jarKeys } from '@/lib/jar/keys'

/** Tare, gross and fill height of one jar, from which weight loss and layers are told. */
export function FillDialog({
  jar,
  onClose,
  onDone,
}: {
  jar: JarRow
  onClose: () => void
  onDone: () => void
}) {
  const [tare, setTare] = useState(text(jar.tareG))
  const [gross, setGross] = useState(text(jar.grossG))
  const [height, setHeight] = useState(text(jar.fillHeightMm))
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}

  async function save() {
    setBusy(true)
    setError(null)
    try {
      await send(jarKeys.one(jar.code), 'PUT', {
        version: jar.version,
        tareG: readTyped(tare),
        grossG: readTyped(gross),
        fillHeightMm: readTyped(height),
      })
      toast(`${jar.code} is weighed`)
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
      title={`Fill of ${jar.code}`}
      sentence="Weight loss counts from these grams, layers from this height."
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={save}>
            Keep the fill
          </Button>
        </>
      }
    >
      <NumberField label="Empty, g" value={tare} onText={setTare} error={fields['tareG']} />
      <NumberField label="Filled and closed, g" value={gross} onText={setGross} error={fields['grossG']} />
      <NumberField label="Fill height, mm" value={height} onText={setHeight} error={fields['fillHeightMm']} />
      <ErrorNote error={error} />
    </Dialog>
  )
}

function text(value: number | null): string {
  return value === null ? '' : String(value)
}
