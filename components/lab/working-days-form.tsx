'use client'

import { useState, type FormEvent } from 'react'
import useSWR, { useSWRConfig } from 'swr'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { Lab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/keys'
import { pullKeys } from '@/lib/pull/keys'
import { weekdays } from '@/lib/study/rules/working-days'

/** The days of the week on which somebody is there; pulls of studies that start from now on are laid on them. */
export function WorkingDaysForm() {
  const { data: lab, mutate } = useSWR<Lab, ClientError>(labKey, fetcher)
  const { mutate: mutateOther } = useSWRConfig()
  const [draft, setDraft] = useState<number[] | null>(null)
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  if (!lab) return null
  const shown = draft ?? lab.workingDays

  async function save(event: FormEvent) {
    event.preventDefault()
    if (!lab) return
    setSending(true)
    setError(null)
    try {
      await keep(() => send(labKey, 'PATCH', { version: lab.version, workingDays: shown }), {
        what: 'working days of the lab',
      })
      await mutate()
      void mutateOther(pullKeys.moves)
      setDraft(null)
      toast('The working days are changed')
    } catch (thrown) {
      setError(thrown)
      if (thrown instanceof ClientError && thrown.status === 412) await mutate()
    } finally {
      setSending(false)
    }
  }

  return (
    <form method="post" onSubmit={save} noValidate className="flex flex-col gap-3">
      <fieldset>
        <legend className="sr-only">Days on which the lab works</legend>
        <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
          {weekdays.map((name, at) => (
            <Checkbox
              key={name}
              label={name}
              checked={shown.includes(at + 1)}
              onSet={(isOn) =>
                setDraft(isOn ? [...shown, at + 1].toSorted() : shown.filter((day) => day !== at + 1))
              }
            />
          ))}
        </div>
      </fieldset>
      <ErrorNote error={error} />
      <Button
        type="submit"
        busy={isSending}
        why={
          draft === null
            ? 'Nothing is changed yet.'
            : draft.length === 0
              ? 'The lab works on one day of the week at least.'
              : undefined
        }
        className="self-start"
      >
        Save the working days
      </Button>
    </form>
  )
}
