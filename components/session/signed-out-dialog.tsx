'use client'

import { useState, useSyncExternalStore, type FormEvent } from 'react'
import { Button, type Density } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { ClientError, send } from '@/lib/http/fetcher'
import { listenToWaiting, waitingNow, type Waiting } from './keep'
import { PasswordField } from './password-field'

type Props = { who: { email: string; initials: string; demoPersonId: string | null }; density?: Density }

/** Stands once in the shell and opens for whatever `keep` could not send. */
export function SignedOutDialog(props: Props) {
  const waiting = useSyncExternalStore(listenToWaiting, waitingNow, () => null)
  return waiting ? <AskPassword {...props} waiting={waiting} /> : null
}

function AskPassword({ who, density, waiting }: Props & { waiting: Waiting }) {
  const [password, setPassword] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const length = [...(waiting.text ?? '')].length

  async function signInAndSend(event: FormEvent) {
    event.preventDefault()
    if (isSending) return
    setSending(true)
    setError(null)
    try {
      await send(
        '/api/session',
        'POST',
        who.demoPersonId ? { demoPersonId: who.demoPersonId } : { email: who.email, password },
      )
      await waiting.signedIn()
    } catch (thrown) {
      setError(thrown)
      setSending(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={waiting.leave}
      density={density}
      title="You were signed out"
      sentence="After eight quiet hours, or from another place. What you typed is still here:"
    >
      <form method="post" onSubmit={signInAndSend} noValidate className="flex flex-col gap-3.5">
        <div>
          {waiting.text ? (
            <p className="mb-2 line-clamp-3 whitespace-pre-line border-l-[3px] border-ink pl-3">
              {waiting.text}
            </p>
          ) : null}
          <p className="text-[length:var(--note-type)] text-soft">
            {waiting.what}
            {length > 0 ? `, ${length} ${length === 1 ? 'character' : 'characters'}` : ''}, not sent
          </p>
        </div>
        {who.demoPersonId ? null : (
          <>
            <input type="hidden" name="username" autoComplete="username" value={who.email} readOnly />
            <PasswordField
              label={`Password of ${who.initials}`}
              name="password"
              autoComplete="current-password"
              autoFocus
              value={password}
              onText={setPassword}
              error={error instanceof ClientError ? error.fields['password'] : undefined}
            />
          </>
        )}
        <ErrorNote error={error} />
        <div className="flex flex-wrap gap-[var(--control-gap)]">
          <Button type="submit" kind="primary" busy={isSending} className="flex-1">
            Sign in and send it
          </Button>
          <Button onClick={waiting.leave}>Not now</Button>
        </div>
      </form>
    </Dialog>
  )
}
