'use client'

import { useState, type FormEvent } from 'react'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { Role } from '@/lib/auth/actor'
import type { ClientRow } from '@/lib/client/queries'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { PersonRow } from '@/lib/person/queries'
import { proposeInitials } from '@/lib/person/rules'
import { peopleKey, personKey } from '@/lib/person/keys'
import { PersonFields, type PersonDraft } from './person-fields'

type Common = { clients: ClientRow[]; onClose: () => void; onDone: (person: PersonRow) => void }

export function InvitePerson({ clients, onClose, onDone }: Common) {
  // Made once, so that pressing twice invites once.
  const [id] = useState(newId)
  const [draft, setDraft] = useState<PersonDraft>({ name: '', initials: '', roles: [], clientId: null })
  const [email, setEmail] = useState('')
  const proposed = proposeInitials(draft.name)
  const { fields, error, isSending, sendWith } = useSending(onDone)

  function invite(event: FormEvent) {
    event.preventDefault()
    void sendWith(() =>
      keep(
        () =>
          send<PersonRow>(peopleKey, 'POST', { ...draft, initials: draft.initials || proposed, id, email }),
        { what: 'invitation', text: email },
      ),
    )
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Invite someone"
      sentence="A mail with a link goes out; the link lets them choose a password, once, within a week."
    >
      <form method="post" onSubmit={invite} noValidate className="flex flex-col gap-3.5">
        <Field
          label="E-mail"
          name="email"
          type="email"
          autoFocus
          value={email}
          onText={setEmail}
          error={fields['email']}
        />
        <PersonFields {...{ draft, clients, fields }} onDraft={setDraft} proposedInitials={proposed} />
        <ErrorNote error={error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" kind="primary" busy={isSending}>
            Send the invitation
          </Button>
        </div>
      </form>
    </Dialog>
  )
}

type Change = Common & { person: PersonRow; isOwn: boolean; onStale: () => void }

export function ChangePerson({ person, isOwn, clients, onClose, onStale, onDone }: Change) {
  const [draft, setDraft] = useState<PersonDraft>({
    name: person.name,
    initials: person.initials,
    roles: person.roles as Role[],
    clientId: person.clientId,
  })
  const [isActive, setActive] = useState(person.isActive)
  const [reason, setReason] = useState('')
  const { fields, error, isSending, sendWith } = useSending(onDone)
  const closes = person.isActive && !isActive

  function change(event: FormEvent) {
    event.preventDefault()
    void sendWith(
      () =>
        keep(
          () =>
            send<PersonRow>(personKey(person.id), 'PATCH', {
              ...draft,
              isActive,
              reason,
              version: person.version,
            }),
          { what: `change of ${person.name}`, text: reason },
        ),
      onStale,
    )
  }

  return (
    <Dialog isOpen onClose={onClose} title={person.name} sentence={person.email}>
      <form method="post" onSubmit={change} noValidate className="flex flex-col gap-3.5">
        <PersonFields {...{ draft, clients, fields }} onDraft={setDraft} rolesAreFixed={isOwn} />
        {isOwn ? null : (
          <Checkbox
            label="The account is open"
            hint="Closed: signed out at once, cannot sign in; the name stays on all they did."
            checked={isActive}
            onSet={setActive}
          />
        )}
        <Field
          label="Reason"
          name="reason"
          hint="It stands in the record, beside your name."
          value={reason}
          onText={setReason}
          error={fields['reason']}
        />
        <ErrorNote error={error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" kind={closes ? 'danger-asked' : 'primary'} busy={isSending}>
            {closes ? 'Close the account' : 'Save'}
          </Button>
        </div>
      </form>
    </Dialog>
  )
}

/** One sending at a time; what is refused at a field is said there, the rest under the form. */
function useSending<T>(onDone: (answer: T) => void) {
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const fields = error instanceof ClientError ? error.fields : {}

  async function sendWith(act: () => Promise<T>, onStale?: () => void) {
    if (isSending) return
    setSending(true)
    setError(null)
    try {
      onDone(await act())
    } catch (thrown) {
      setError(thrown)
      if (thrown instanceof ClientError && thrown.status === 412) onStale?.()
    } finally {
      setSending(false)
    }
  }

  return { fields, error: Object.keys(fields).length > 0 ? null : error, isSending, sendWith }
}
