'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import type { FlagPage } from '@/lib/flag/queries/one'
import { flagKeys } from '@/lib/flag/keys'
import { isStale, Stale } from './stale'
import { useFlagAct } from './use-flag-act'

type Props = { flag: FlagPage; onDone: () => void; onStale: () => void }

/** QA has the last word about what is out at a station that decides. */
export function ClosingForm({ flag, onDone, onStale }: Props) {
  const [note, setNote] = useState('')
  const [version, setVersion] = useState(flag.version)
  const { act, isSending, fields, error } = useFlagAct()

  async function submit(event: FormEvent) {
    event.preventDefault()
    const refused = await act({
      url: flagKeys.close(flag.number),
      body: { version, note },
      what: `closing of flag ${flag.number}`,
      text: note,
      onDone: () => {
        toast(`Flag ${flag.number} is closed.`)
        onDone()
      },
    })
    if (refused && isStale(refused)) {
      setVersion(refused.detail.version)
      onStale()
    } else if (refused?.status === 409) onStale()
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3 border-t border-ink pt-3">
      <TextArea
        label="Why it can be closed"
        value={note}
        onText={setNote}
        error={fields['note']}
        hint="The answer above stays as it is."
      />
      {error ? isStale(error) ? <Stale error={error} /> : <ErrorNote error={error} /> : null}
      <Button
        type="submit"
        kind="primary"
        busy={isSending}
        why={
          flag.state === 'closed'
            ? 'It is closed now. What you wrote can still go into a comment.'
            : undefined
        }
      >
        Close flag {flag.number}
      </Button>
    </form>
  )
}
