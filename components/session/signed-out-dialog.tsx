'use client'

import { useState, type FormEvent } from 'react'
import { Button, type Density } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { ClientError, send } from '@/lib/http/fetcher'
import { PasswordField } from './password-field'

/** Someone was signed out while typing: what was to be sent, and the way to send it again. */
export type Unsent = {
  /** Begins the last line: "answer to flag 36". */
  what: string
  /** What was typed, for the eye. */
  text?: string
  again: () => Promise<void>
}

type Props = {
  unsent: Unsent | null
  who: { email: string; initials: string }
  density?: Density
  /** Leaves the dialog; the text stays where it was typed. */
  onClose: () => void
}

/** Asks for the password in place and then sends once more: nothing typed is lost. */
export function SignedOutDialog({ unsent, who, density, onClose }: Props) {
  const [password, setPassword] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)

  async function signInAndSend(event: FormEvent) {
    event.preventDefault()
    if (!unsent) return
    setSending(true)
    setError(null)
    try {
      await send('/api/session', 'POST', { email: who.email, password })
      setPassword('')
      await unsent.again()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setSending(false)
    }
  }

  return (
    <Dialog
      isOpen={unsent !== null}
      onClose={onClose}
      density={density}
      title="You were signed out"
      sentence="After eight quiet hours, or because it was done elsewhere. What you typed is still here:"
    >
      <form method="post" onSubmit={signInAndSend} noValidate className="flex flex-col gap-3.5">
        {unsent?.text ? (
          <p className="line-clamp-3 border-l-[3px] border-ink pl-3 text-15">{unsent.text}</p>
        ) : null}
        <p className="text-[length:var(--note-type)] text-soft">
          {unsent?.what}
          {unsent?.text ? `, ${[...unsent.text].length} characters` : ''}, not sent
        </p>
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
        <ErrorNote error={error} />
        <div className="flex flex-wrap gap-[var(--control-gap)]">
          <Button type="submit" kind="primary" busy={isSending} className="flex-1">
            Sign in and send it
          </Button>
          <Button onClick={onClose}>Not now</Button>
        </div>
      </form>
    </Dialog>
  )
}

/** Whether a refusal means that the session has ended. */
export function isSignedOut(error: unknown): boolean {
  return error instanceof ClientError && error.status === 401
}
