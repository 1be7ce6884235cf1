'use client'

import { useState, type FormEvent } from 'react'
import useSWR from 'swr'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { Lab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/keys'

export function LabForm({ timeZones }: { timeZones: string[] }) {
  const { data: lab, mutate } = useSWR<Lab, ClientError>(labKey, fetcher)
  const [draft, setDraft] = useState<{ name: string; timeZone: string } | null>(null)
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const fields = error instanceof ClientError ? error.fields : {}
  if (!lab) return null
  const shown = draft ?? lab
  // The server may know a zone under another name than the browser's list.
  const zones = timeZones.includes(shown.timeZone) ? timeZones : [shown.timeZone, ...timeZones]

  async function save(event: FormEvent) {
    event.preventDefault()
    if (!lab) return
    setSending(true)
    setError(null)
    try {
      await keep(
        () => send(labKey, 'PATCH', { version: lab.version, name: shown.name, timeZone: shown.timeZone }),
        { what: 'name and time zone of the lab', text: shown.name },
      )
      await mutate()
      setDraft(null)
      toast('The lab is changed')
    } catch (thrown) {
      setError(thrown)
      if (thrown instanceof ClientError && thrown.status === 412) await mutate()
    } finally {
      setSending(false)
    }
  }

  return (
    <form method="post" onSubmit={save} noValidate className="flex flex-col gap-3.5">
      <Field
        label="Name of the lab"
        name="labName"
        value={shown.name}
        onText={(name) => setDraft({ ...shown, name })}
        error={fields['name']}
      />
      <Select
        label="Time zone"
        options={zones.map((zone) => ({ value: zone, label: zone.replaceAll('_', ' ') }))}
        value={shown.timeZone}
        onPick={(timeZone) => setDraft({ ...shown, timeZone })}
        error={fields['timeZone']}
      />
      <ErrorNote error={Object.keys(fields).length > 0 ? null : error} />
      <Button
        type="submit"
        busy={isSending}
        why={draft ? undefined : 'Nothing is changed yet.'}
        className="self-start"
      >
        Save
      </Button>
    </form>
  )
}
