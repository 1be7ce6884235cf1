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
import {
  emulsions,
  purposes,
  readyMadePlan,
  type Emulsion,
  type Purpose,
} from '@/lib/protocol/rules/ready-made'
import { protocolKeys } from '@/lib/protocol/keys'

/** A ready-made protocol as a first version that the lab then owns and edits. */
export function TakeReadyMade({
  onTaken,
  kind = 'secondary',
}: {
  onTaken: (versionId: string, code: string) => void
  kind?: 'primary' | 'secondary'
}) {
  const [isOpen, setIsOpen] = useState(false)
  const [purpose, setPurpose] = useState<Purpose>('screen')
  const [emulsion, setEmulsion] = useState<Emulsion>('cream')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)

  async function take() {
    setBusy(true)
    setError(null)
    const versionId = newId()
    try {
      const made = await send<{ code: string }>(protocolKeys.list, 'POST', {
        id: newId(),
        versionId,
        name: `${purposes[purpose].name}, ${emulsions[emulsion].name}`,
        plan: readyMadePlan(purpose, emulsion),
      })
      toast(`${made.code} is taken`)
      setIsOpen(false)
      onTaken(versionId, made.code)
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <>
      <Button kind={kind} onClick={() => setIsOpen(true)}>
        Take a ready-made one
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title="Take a ready-made protocol"
        sentence="A start that you then edit: no standard fixes its weeks and temperatures."
        width={560}
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={busy} onClick={take}>
              Take it
            </Button>
          </>
        }
      >
        <RadioGroup
          label="What for"
          layout="ledger"
          value={purpose}
          onPick={(value) => setPurpose(value as Purpose)}
          options={Object.entries(purposes).map(([value, { name }]) => ({ value, label: name }))}
        />
        <p className="text-15 text-soft">{purposes[purpose].summary}</p>
        <Select
          label="On what"
          value={emulsion}
          options={Object.entries(emulsions).map(([value, { name }]) => ({ value, label: name }))}
          onPick={(value) => setEmulsion(value as Emulsion)}
          hint={emulsions[emulsion].summary}
        />
        <ErrorNote error={error} />
      </Dialog>
    </>
  )
}
