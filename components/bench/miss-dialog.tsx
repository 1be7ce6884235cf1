'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/schema'

const reasons = ['not in its place', 'broken', 'oven could not be opened', 'ran out of time']

/** A jar that cannot be read is an entry too, with its reason. */
export function MissDialog({
  jar,
  onClose,
  onDone,
}: {
  jar: BenchJarPage
  onClose: () => void
  onDone: () => void
}) {
  const [reason, setReason] = useState('')
  const [isLost, setLost] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function miss() {
    setBusy(true)
    setError(null)
    try {
      await send(pullKeys.miss(jar.pullJarId), 'POST', { version: jar.version, reason, isJarLost: isLost })
      onDone()
    } catch (refused) {
      setError(refused)
      setBusy(false)
    }
  }
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Why is ${jar.name} not read?`}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="danger-asked"
            busy={isBusy}
            why={reason.trim() === '' ? 'Say why first.' : undefined}
            onClick={miss}
          >
            Note it as not read
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap gap-3">
        {reasons.map((r) => (
          <Button
            key={r}
            density="bench"
            onClick={() => {
              setReason(r)
              setLost(r === 'broken' || r === 'not in its place')
            }}
          >
            {r}
          </Button>
        ))}
      </div>
      <Field label="Reason" density="bench" value={reason} onText={setReason} />
      <Checkbox
        label="The jar is gone: broken or not to be found"
        density="bench"
        checked={isLost}
        onSet={setLost}
      />
      <ErrorNote error={error} />
    </Dialog>
  )
}
