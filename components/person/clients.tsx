'use client'

import { useState, type FormEvent } from 'react'
import { mutate } from 'swr'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { ClientRow } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/keys'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'

export function Clients({ clients }: { clients: ClientRow[] }) {
  const [draft, setDraft] = useState(() => ({ id: newId(), name: '' }))
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)

  async function add(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      await keep(() => send(clientsKey, 'POST', draft), { what: 'another client', text: draft.name })
      setDraft({ id: newId(), name: '' })
      await mutate(clientsKey)
    } catch (thrown) {
      setError(thrown)
    } finally {
      setSending(false)
    }
  }

  return (
    <>
      {clients.length === 0 ? (
        <p className="text-soft">No client yet. Studies can be run for the lab itself, too.</p>
      ) : (
        <ul>
          {clients.map((client) => (
            <li key={client.id} className="flex min-h-9 items-center border-b border-hair">
              {client.name}
            </li>
          ))}
        </ul>
      )}
      <form method="post" onSubmit={add} noValidate className="mt-3 flex flex-wrap items-end gap-2">
        <Field
          label="Another client"
          name="clientName"
          value={draft.name}
          onText={(name) => setDraft({ ...draft, name })}
          wrap="flex-1 min-w-[12rem]"
        />
        <Button type="submit" busy={isSending}>
          Add it
        </Button>
      </form>
      <div className="mt-2">
        <ErrorNote error={error} />
      </div>
    </>
  )
}
