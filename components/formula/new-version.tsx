'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { TextArea } from '@/components/ui/text-area'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'

type Props = { formula: { code: string; number: number; versionId: string }; next: number }

/** A new draft from the version on screen. */
export function NewVersion({ formula, next }: Props) {
  const router = useRouter()
  const [isOpen, setIsOpen] = useState(false)
  const [id] = useState(newId)
  const [note, setNote] = useState('')
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)

  async function make() {
    setIsSending(true)
    setRefusal(null)
    try {
      const url = `/api/formulas/${encodeURIComponent(formula.code)}/versions`
      const body = { id, fromVersionId: formula.versionId, note }
      const made = await send<{ number: number }>(url, 'POST', body)
      router.push(`/formulas/${formula.code}?version=${made.number}`)
      router.refresh()
      setIsOpen(false)
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    } finally {
      setIsSending(false)
    }
  }

  return (
    <>
      <Button kind="primary" onClick={() => setIsOpen(true)}>
        New version from this
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title={`Version ${next} of ${formula.code}`}
        sentence={`It begins as a copy of version ${formula.number}.`}
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={isSending} onClick={() => void make()}>
              Make version {next}
            </Button>
          </>
        }
      >
        <TextArea
          label="Why"
          value={note}
          onText={setNote}
          error={refusal?.fields['note']}
          hint="What the version before did, and what is tried now."
        />
        <ErrorNote error={refusal && !refusal.fields['note'] ? refusal : null} />
      </Dialog>
    </>
  )
}
